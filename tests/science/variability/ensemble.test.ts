import { describe, expect, it } from 'vitest';
import { Random } from '../../../src/science/random.js';
import { solveEnsemble } from '../../../src/science/variability/ensemble.js';

/** Every star on every frame, with a known offset for each frame. */
function night(offsets: readonly number[], stars: number, change: (star: number, frame: number) => number) {
  const random = new Random(5);
  const readings = {
    frame: [] as number[],
    star: [] as number[],
    mag: [] as number[],
    sigma_mag: [] as number[],
  };
  offsets.forEach((offset, frame) => {
    for (let star = 0; star < stars; star++) {
      readings.frame.push(frame);
      readings.star.push(star);
      readings.mag.push(12 + star * 0.1 + offset + random.normal(0, 0.01) + change(star, frame));
      readings.sigma_mag.push(0.01);
    }
  });
  return readings;
}

describe('the ensemble of a night', () => {
  const OFFSETS = [0, 0.02, 0.4, -0.01, 0, 0.01, 0];

  it('finds what each frame lost, undiluted by the frame itself', () => {
    const { offset_mag, offsetSigma_mag } = solveEnsemble(
      night(OFFSETS, 40, () => 0),
      7,
      40,
    );
    OFFSETS.forEach((offset, frame) => {
      expect(Math.abs(offset_mag[frame] - offset)).toBeLessThan(5 * offsetSigma_mag[frame]);
    });
    expect(offsetSigma_mag[0]).toBeCloseTo(0.01 / Math.sqrt(40), 4);
  });

  it('is hardly moved by variables: three of forty stars that faded by half a magnitude', () => {
    const faded = (star: number, frame: number) => (star < 3 && frame > 3 ? 0.5 : 0);
    const { offset_mag } = solveEnsemble(night(OFFSETS, 40, faded), 7, 40);
    for (const [frame, offset] of OFFSETS.entries()) {
      expect(Math.abs(offset_mag[frame] - offset)).toBeLessThan(0.01);
    }
  });

  it('leaves frames alone that share no star with the others, and does not know a frame without stars', () => {
    const readings = {
      frame: [0, 0, 1, 1, 2, 2],
      star: [0, 1, 0, 1, 2, 3],
      mag: [12, 13, 12.1, 13.1, 9, 10],
      sigma_mag: [0.01, 0.01, 0.01, 0.01, 0.01, 0.01],
    };
    const { offset_mag } = solveEnsemble(readings, 4, 4);
    expect(offset_mag[1] - offset_mag[0]).toBeCloseTo(0.1, 6);
    expect(offset_mag[2]).toBeCloseTo((offset_mag[0] + offset_mag[1]) / 2, 6);
    expect(offset_mag[3]).toBeNaN();
  });
});
