import { describe, expect, it } from 'vitest';
import { skyRate_ePerSPerPixel } from '../../src/science/photometry/count-rate.js';
import { airmass, altitudeOfAirmass_deg } from '../../src/science/sky/airmass.js';
import {
  brighteningInBand_mag,
  moonBrightening_mag,
  moonlight_nL,
  scatteringFunction,
} from '../../src/science/sky/moonlight.js';
import { darkSky_magPerArcsec2, skyPath } from '../../src/science/sky/night-sky.js';
import { refraction_deg, refractionFactor } from '../../src/science/sky/refraction.js';
import {
  magnitudeOfNanolambert,
  nanolambert,
  together_magPerArcsec2,
} from '../../src/science/sky/surface-brightness.js';
import { zenithTwilight_magPerArcsec2 } from '../../src/science/sky/twilight.js';
import { parseTable } from '../../src/science/table.js';
import skyTableText from '../../src/tables/sky.csv';
import { type Calculation, type Check, readChecks, testChecks } from './checks.js';
import airmassText from './data/checks_airmass.csv';
import skyText from './data/checks_sky.csv';

const otherFormula: Calculation = { notOurs: 'Young 1994 is the formula in use' };

const geometry = (check: Check) => ({
  phaseAngle_deg: check.input('alpha'),
  separation_deg: check.input('rho'),
  targetZenithDistance_deg: check.input('Z'),
  moonZenithDistance_deg: check.input('Zm'),
});
const dark = (check: Check) =>
  darkSky_magPerArcsec2(check.input('V_zen'), check.input('k'), check.input('Z'));
const WAVELENGTH: Readonly<Record<string, number>> = {
  U: 366,
  B: 438,
  V: 545,
  R: 641,
  Rc: 641,
  I: 798,
  Ic: 798,
};

describe('airmass', () => {
  it('reads every row of the file', () => expect(readChecks(airmassText)).toHaveLength(138));

  testChecks(airmassText, {
    kasten_young_1989: otherFormula,
    pickering_2002: otherFormula,
    hardie_1962: otherFormula,
    young_1994: check => airmass(check.input('h_true')),
    ks91_scattering: check => skyPath(90 - check.input('h')),
    raytrace_reference: { notOurs: 'given for apparent altitudes' },
    saemundsson_1986: check => 60 * refraction_deg(check.input('h_true')),
    bennett_1982: { notOurs: 'given for apparent altitudes; what is known here is the airless one' },
    pulkovo_comparison: { notOurs: 'given for apparent altitudes; what is known here is the airless one' },
    pressure_temperature_factor: check =>
      refractionFactor({
        pressure_hPa: check.input('P_hPa'),
        temperature_C: check.input('T_C'),
        vapour_hPa: 0,
      }),
  });

  it('is not known below the horizon', () => expect(airmass(-0.1)).toBeNaN());

  it('the altitude of an airmass inverts it', () => {
    for (const limit of [1.2, 2, 2.5, 4]) expect(airmass(altitudeOfAirmass_deg(limit))).toBeCloseTo(limit, 5);
  });
});

describe('night sky, moonlight and twilight', () => {
  testChecks(skyText, {
    nanolambert_from_mag: check => nanolambert(check.input('V')),
    mag_from_nanolambert: check => magnitudeOfNanolambert(check.input('B_nL')),
    moon_V_magnitude: { notOurs: 'the Moon itself is not shown with a magnitude' },
    scattering_f: check => scatteringFunction(check.input('rho')),
    B_moon: check => moonlight_nL(geometry(check), check.input('k')),
    sky_V_total: check => dark(check) - moonBrightening_mag(dark(check), geometry(check), check.input('k')),
    dark_V_ks91: check => darkSky_magPerArcsec2(check.input('V_zen'), check.input('k'), check.input('Z')),
    dark_V_airglow_fraction: { notOurs: 'Krisciunas & Schaefer 1991 is the model in use' },
    zenith_twilight: check =>
      zenithTwilight_magPerArcsec2(check.input('sun_zenith_distance') - 90, WAVELENGTH[check.word('band')]),
    band_factor_from_walker: { notOurs: 'the factors are taken as they stand' },
    band_brightening: check => {
      const wavelength = WAVELENGTH[check.word('band')];
      return wavelength === undefined
        ? 'a band that is interpolated here'
        : brighteningInBand_mag(check.input('dm_V'), wavelength);
    },
    sky_rate_per_pixel: check =>
      skyRate_ePerSPerPixel(check.input('mu'), check.input('ZP_e'), check.input('pixel_arcsec') ** 2),
    add_surface_brightness: check =>
      together_magPerArcsec2(check.input('mu1'), check.input('mu2'), check.input('mu3')),
  });

  it('reads every row of the file', () => expect(readChecks(skyText)).toHaveLength(88));
});

describe('the worked V brightnesses of moonlit skies in sky.csv (Krisciunas & Schaefer 1991)', () => {
  const rows = parseTable(skyTableText).rows.filter(row => row.text('kind') === 'moonlight_worked');
  it.each(rows.map(row => [row.text('condition'), row.number('value')] as const))(
    '%s: %f',
    (condition, expected) => {
      const value = (name: string) => Number(new RegExp(`\\b${name}=([\\d.]+)`).exec(condition)?.[1]);
      const darkV = darkSky_magPerArcsec2(21.587, 0.172, value('Z'));
      const moon = {
        phaseAngle_deg: value('alpha'),
        separation_deg: value('rho'),
        targetZenithDistance_deg: value('Z'),
        moonZenithDistance_deg: value('Zmoon'),
      };
      expect(darkV - moonBrightening_mag(darkV, moon, 0.172)).toBeCloseTo(expected, 2);
    },
  );
});
