import { describe, expect, it } from 'vitest';
import { skyRate_ePerSPerPixel } from '../../src/science/photometry/count-rate.js';
import { airmass, altitudeOfAirmass_deg } from '../../src/science/sky/airmass.js';
import { darkSky_magPerArcsec2, skyPath } from '../../src/science/sky/night-sky.js';
import { type Calculation, testChecks } from './checks.js';
import airmassText from './data/checks_airmass.csv';
import skyText from './data/checks_sky.csv';

const otherFormula: Calculation = { notOurs: 'Young 1994 is the formula in use' };
const moon: Calculation = { notOurs: 'moonlight is not modelled yet' };

describe('airmass', () => {
  testChecks(airmassText, {
    kasten_young_1989: otherFormula,
    pickering_2002: otherFormula,
    hardie_1962: otherFormula,
    young_1994: check => airmass(check.input('h_true')),
    ks91_scattering: check => skyPath(90 - check.input('h')),
    raytrace_reference: { notOurs: 'given for apparent altitudes' },
    saemundsson_1986: { notOurs: 'altitudes are airless throughout' },
    bennett_1982: { notOurs: 'altitudes are airless throughout' },
    pulkovo_comparison: { notOurs: 'altitudes are airless throughout' },
    pressure_temperature_factor: { notOurs: 'altitudes are airless throughout' },
  });

  it('is not known below the horizon', () => expect(airmass(-0.1)).toBeNaN());

  it('the altitude of an airmass inverts it', () => {
    for (const limit of [1.2, 2, 2.5, 4]) expect(airmass(altitudeOfAirmass_deg(limit))).toBeCloseTo(limit, 5);
  });
});

describe('dark sky', () => {
  testChecks(skyText, {
    nanolambert_from_mag: moon,
    mag_from_nanolambert: moon,
    moon_V_magnitude: moon,
    scattering_f: moon,
    B_moon: moon,
    sky_V_total: moon,
    dark_V_ks91: check => darkSky_magPerArcsec2(check.input('V_zen'), check.input('k'), check.input('Z')),
    dark_V_airglow_fraction: { notOurs: 'Krisciunas & Schaefer 1991 is the model in use' },
    zenith_twilight: { notOurs: 'no exposure is suggested in twilight' },
    band_factor_from_walker: moon,
    band_brightening: moon,
    sky_rate_per_pixel: check =>
      skyRate_ePerSPerPixel(check.input('mu'), check.input('ZP_e'), check.input('pixel_arcsec') ** 2),
    add_surface_brightness: moon,
  });
});
