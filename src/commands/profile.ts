import { bandZeroPoint_mag } from '../follow/exposure/imager.js';
import { darkZenith, faintestIn_mag } from '../follow/exposure/limits.js';
import { ExposureAdviser } from '../follow/exposure/suggest.js';
import type { ExposureSuggestion } from '../follow/exposure/suggestion.js';
import type { Profile } from '../follow/settings.js';
import { Ephemeris } from '../follow/sky/ephemeris.js';
import { clock, darkWords, nightOf, type Twilight } from '../follow/sky/night-of.js';
import { BAND_COUNT } from '../science/bands.js';
import { slabExtinction_AV } from '../science/dust-slab.js';
import { collectingArea_cm2, countRate_ePerS } from '../science/photometry/count-rate.js';
import { EXIT } from './exit-codes.js';
import type { CommandIo } from './io.js';
import { profileFor } from './load-profile.js';

const TEST_MAG = 15;
const LIMIT_S = 60;
const LIMIT_SNR = 5;

/** Checks a profile and prints what follows from it, so that a slip in a number is seen before the night. */
export async function profileCommand(
  name: string,
  options: { readonly at?: number },
  io: CommandIo,
): Promise<number> {
  const profile = profileFor(name, io);
  const lines = [
    ...siteLines(profile),
    '',
    ...bandLines(profile),
    '',
    ...setupLines(profile),
    '',
    ...nightLines(profile, options.at ?? io.now_ms()),
  ];
  await io.out(`${lines.join('\n')}\n`);
  return EXIT.ok;
}

function siteLines({ name, site, telescope, field }: Profile): string[] {
  const area_m2 = collectingArea_cm2(telescope.aperture_m, telescope.obstruction) / 1e4;
  const latitude = `${Math.abs(site.latitude_deg).toFixed(2)} ${site.latitude_deg < 0 ? 'S' : 'N'}`;
  const longitude = `${Math.abs(site.longitude_deg).toFixed(2)} ${site.longitude_deg < 0 ? 'W' : 'E'}`;
  const top_deg = Math.max(0, ...site.horizon.map(([, altitude_deg]) => altitude_deg));
  const horizon = top_deg > 0 ? `, horizon up to ${top_deg} deg` : '';
  const zenith = site.zenithLimit_deg > 0 ? `, not within ${site.zenithLimit_deg} deg of the zenith` : '';
  return [
    `${name}: the profile is in order`,
    `site       ${site.name}, ${latitude}, ${longitude}, ${site.height_m} m`,
    `telescope  ${telescope.aperture_m} m, collecting area ${area_m2.toFixed(3)} m2`,
    `limits     altitude ${site.minAltitude_deg} deg, airmass ${site.maxAirmass}, Sun below ${site.sunLimit_deg} deg, Moon at ${site.moonDistance_deg} deg${horizon}${zenith}`,
    `field      ${field.name}, ${field.population}${Number.isNaN(field.modulus_mag) ? '' : `, modulus ${field.modulus_mag} mag`}, ${dustWords(field)}`,
  ];
}

function dustWords({ dust, extinction_AV, extinctionSigma_AV }: Profile['field']): string {
  if (dust === undefined) return `A_V ${extinction_AV} ± ${extinctionSigma_AV} mag`;
  const steps = [200, 1000, 5000].map(
    distance_pc => `${slabExtinction_AV(dust, distance_pc).toFixed(2)} at ${distance_pc} pc`,
  );
  return `A_V ${steps.join(', ')}`;
}

/** Per band at the zenith, in the profile's seeing. */
function bandLines(profile: Profile): string[] {
  const { passbands } = new ExposureAdviser(profile);
  const rows = profile.bands.flatMap(settings => {
    const passband = passbands.get(settings.band);
    if (passband === undefined) return [];
    const zeroPoint = bandZeroPoint_mag(profile.telescope, settings, passband);
    const rate = countRate_ePerS(TEST_MAG, zeroPoint, settings.extinction_magPerAirmass, 1);
    const limit = faintestIn_mag(profile, settings.band, LIMIT_S, LIMIT_SNR);
    return `${settings.band.padEnd(6)}${zeroPoint.toFixed(2).padStart(11)}${rate.toFixed(0).padStart(16)}${(Number.isNaN(limit) ? '-' : limit.toFixed(1)).padStart(22)}`;
  });
  return [
    `band   1 e-/s at mag   e-/s at mag ${TEST_MAG}   ${LIMIT_SNR} sigma in ${LIMIT_S} s, mag`,
    ...rows,
    'Zero points worked out from throughput are good to 10-15 %; compare with a measured one.',
  ];
}

/** Every setup on a star of magnitude 15 in all bands (a flat spectrum), at the zenith. */
function setupLines(profile: Profile): string[] {
  const adviser = new ExposureAdviser(profile);
  const star = {
    mag: new Float64Array(BAND_COUNT).fill(TEST_MAG),
    sigma_mag: new Float64Array(BAND_COUNT).fill(0.05),
  };
  const conditions = darkZenith(profile);
  return profile.setups.map((setup, i) => {
    const suggestion = adviser.suggest(star, conditions)[i];
    return `${setup.name}: S/N ${setup.targetSnr} on a star of magnitude ${TEST_MAG}: ${exposureWords(suggestion)}`;
  });
}

function exposureWords(suggestion: ExposureSuggestion): string {
  if (!suggestion.possible) return suggestion.limitedBy;
  return `${suggestion.count} x ${suggestion.each_s} s, ${(suggestion.total_s / 60).toFixed(1)} min in all, limited by ${suggestion.limitedBy}`;
}

function nightLines({ site }: Profile, now_ms: number): string[] {
  const ephemeris = new Ephemeris(site);
  const night = nightOf(ephemeris, site, now_ms);
  const span = ({ dusk_ms, dawn_ms }: Twilight) =>
    Number.isNaN(dusk_ms) ? 'does not happen' : `${clock(dusk_ms)} to ${clock(dawn_ms)} UT`;
  const middle = (night.noon_ms + night.nextNoon_ms) / 2;
  const moonrise = ephemeris.nextMoonRiseOrSet_ms(true, night.noon_ms, 1);
  const moonset = ephemeris.nextMoonRiseOrSet_ms(false, night.noon_ms, 1);
  return [
    `night of ${new Date(night.noon_ms).toISOString().slice(0, 10)}: ${darkWords(night)} (Sun below ${site.sunLimit_deg} deg)`,
    `sunset to sunrise          ${span({ dusk_ms: night.sunset_ms, dawn_ms: night.sunrise_ms })}`,
    `nautical twilight outside  ${span(night.nautical)}`,
    `astronomical night         ${span(night.astronomical)}`,
    `Moon  ${(100 * ephemeris.moonIllumination(middle)).toFixed(0)} % lit, ${moonWords(moonrise, moonset)}, altitude ${ephemeris.moonAltitude_deg(middle).toFixed(0)} deg at ${clock(middle)} UT`,
  ];
}

function moonWords(rise: number, set: number): string {
  const words = [
    Number.isNaN(rise) ? 'does not rise' : `rises ${clock(rise)}`,
    Number.isNaN(set) ? 'does not set' : `sets ${clock(set)}`,
  ];
  return words.join(', ');
}
