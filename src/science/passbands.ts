import passbandsText from '../tables/passbands.csv';
import { BAND_COUNT, BAND_INDEX, BANDS, type Band, isBand } from './bands.js';
import { parseTable } from './table.js';

/** A passband outside the atmosphere. */
export interface Passband {
  readonly band: Band;
  /** Effective wavelength. */
  readonly wavelength_nm: number;
  /** Equivalent width: integral of the transmission over its maximum. */
  readonly width_nm: number;
  /** Photons per second, cm^2 and Angstrom of a magnitude-0 source. */
  readonly photonFlux: number;
}

/**
 * The first row of each band in src/tables/passbands.csv: Bessell et al. 1998, Cohen et al. 2003, Fukugita et al.
 * 1996 / Doi et al. 2010, Tonry et al. 2012, Riello et al. 2021.
 */
export function readPassbands(): ReadonlyMap<Band, Passband> {
  const passbands = new Map<Band, Passband>();
  for (const row of parseTable(passbandsText).rows) {
    const band = row.text('band');
    const width_nm = row.number('width_nm');
    if (!isBand(band) || passbands.has(band) || Number.isNaN(width_nm)) continue;
    const published = row.number('photon_pub');
    passbands.set(band, {
      band,
      wavelength_nm: row.number('lambda_eff_nm'),
      width_nm,
      photonFlux: Number.isNaN(published) ? row.number('photon_calc') : published,
    });
  }
  return passbands;
}

/**
 * Photon flux of a star at one wavelength, photons/s/cm^2/Angstrom above the atmosphere, from its magnitudes (laid
 * out as BANDS, NaN unknown): straight line in log flux over log wavelength between the nearest bands on either
 * side; NaN where there is no band on one side within a factor of 1.5 in wavelength.
 */
export function photonFluxAt(
  passbands: ReadonlyMap<Band, Passband>,
  mags: ArrayLike<number>,
  wavelength_nm: number,
): number {
  let below: { x: number; y: number } | undefined;
  let above: { x: number; y: number } | undefined;
  const target = Math.log(wavelength_nm);
  for (let index = 0; index < BAND_COUNT; index++) {
    const passband = passbands.get(BANDS[index]);
    // Gaia's G is too wide to say anything about one wavelength.
    if (passband === undefined || Number.isNaN(mags[index]) || index === BAND_INDEX.G) continue;
    const point = {
      x: Math.log(passband.wavelength_nm),
      y: Math.log(passband.photonFlux) - 0.4 * Math.LN10 * mags[index],
    };
    if (Math.abs(point.x - target) > Math.log(1.5)) continue;
    if (point.x <= target && (below === undefined || point.x > below.x)) below = point;
    if (point.x >= target && (above === undefined || point.x < above.x)) above = point;
  }
  if (below === undefined || above === undefined) return Number.NaN;
  if (above.x === below.x) return Math.exp(below.y);
  return Math.exp(below.y + ((above.y - below.y) * (target - below.x)) / (above.x - below.x));
}
