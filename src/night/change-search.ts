import type { StarCatalogue } from '../catalogue/stars.js';
import { describeChange, LEAST_READINGS } from '../follow/changes.js';
import type { BandChange } from '../follow/flags/index.js';
import type { Band } from '../science/bands.js';
import { chiSquareChance, median } from '../science/statistics.js';
import type { FrameSummary } from './view.js';

/** A star is looked at reading by reading when its scatter is at least this improbable. */
const WORTH_A_LOOK = 0.01;
/** Frame-to-frame shifts smaller than their own error are left alone. */
const SHIFT_SIGMA = 2;

/** Which stars changed during the night, searched anew after each frame. */
export interface ChangesOfNight {
  readonly of: (star: number) => readonly BandChange[];
  readonly starsSearched: number;
}

/**
 * Looks for stars that vary more than their errors, band by band: chi-square about the mean picks the
 * candidates; their readings are freed of the frames' common shifts and described one by one.
 */
export class ChangeSearch {
  search(catalogue: StarCatalogue, frames: readonly FrameSummary[]): ChangesOfNight {
    const changes = new Map<number, BandChange[]>();
    let searched = 0;
    for (const band of catalogue.bands) {
      const counts = catalogue.readingsIn(band);
      const chi2 = catalogue.chi2(band);
      const enough = [...counts.keys()].filter(star => counts[star] >= LEAST_READINGS);
      searched = Math.max(searched, enough.length);
      if (enough.length === 0) continue;
      // Real errors are never quite right: the field's median reduced chi-square is made 1, upward only.
      const scale2 = Math.max(1, median(enough.map(star => chi2[star] / (counts[star] - 1))));
      const shifts = frameShifts(catalogue, frames, band);
      for (const star of enough) {
        if (chiSquareChance(chi2[star] / scale2, counts[star] - 1) > WORTH_A_LOOK) continue;
        const change = describeChange(shifted(catalogue, star, band, shifts), Math.sqrt(scale2));
        if (change === undefined) continue;
        const known = changes.get(star) ?? [];
        known.push(change);
        changes.set(star, known);
      }
    }
    return { of: star => changes.get(star) ?? [], starsSearched: searched };
  }
}

function frameShifts(
  catalogue: StarCatalogue,
  frames: readonly FrameSummary[],
  band: Band,
): Map<number, number> {
  const shifts = new Map<number, number>();
  for (const frame of frames) {
    if (!frame.bands.includes(band)) continue;
    const shift = catalogue.frameShift(frame.index, band);
    if (shift !== undefined && Math.abs(shift.shift_mag) > SHIFT_SIGMA * shift.sigma_mag) {
      shifts.set(frame.index, shift.shift_mag);
    }
  }
  return shifts;
}

/** Clean readings of a star, each freed of its frame's shift. */
function shifted(catalogue: StarCatalogue, star: number, band: Band, shifts: ReadonlyMap<number, number>) {
  const curve = catalogue.lightCurve(star, band);
  const clean = [...curve.mag.keys()].filter(i => curve.suspect[i] === 0);
  return {
    band,
    time_ms: Float64Array.from(clean, i => curve.time_ms[i]),
    mag: Float64Array.from(clean, i => curve.mag[i] - (shifts.get(curve.frame[i]) ?? 0)),
    sigma_mag: Float64Array.from(clean, i => curve.sigma_mag[i]),
  };
}
