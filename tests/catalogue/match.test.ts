import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { separation_deg, ZoneIndex } from '../../src/catalogue/match.js';

/** The obvious way: look at every star. */
function slowNearest(
  ra: Float64Array,
  dec: Float64Array,
  at: readonly [number, number],
  radius: number,
): number {
  let best = -1;
  let bestSeparation = Number.POSITIVE_INFINITY;
  for (let star = 0; star < ra.length; star++) {
    const separation = separation_deg(at[0], at[1], ra[star], dec[star]);
    if (separation <= radius && separation < bestSeparation) {
      best = star;
      bestSeparation = separation;
    }
  }
  return best;
}

/** Positions in small clumps, so that neighbours are common, also at the poles and across RA 0. */
const clump = fc.constantFrom<readonly [number, number]>(
  [0, 0],
  [359.999, 45],
  [120, 89.9995],
  [10, -90],
  [200, -60],
);
const position = fc
  .tuple(clump, fc.double({ min: -1, max: 1, noNaN: true }), fc.double({ min: -1, max: 1, noNaN: true }))
  .map(([[ra, dec], x, y]): readonly [number, number] => {
    const newDec = Math.max(-90, Math.min(90, dec + 0.002 * y));
    return [
      (((ra + (0.002 * x) / Math.max(0.0001, Math.cos((dec * Math.PI) / 180))) % 360) + 360) % 360,
      newDec,
    ];
  });

describe('nearest star', () => {
  it('is the one that looking at every star finds', () => {
    fc.assert(
      fc.property(
        fc.array(position, { maxLength: 200 }),
        position,
        fc.constantFrom(0.0002, 0.001, 0.005),
        (stars, at, radius) => {
          const ra = Float64Array.from(stars, star => star[0]);
          const dec = Float64Array.from(stars, star => star[1]);
          const index = new ZoneIndex(ra, dec, 0, stars.length, radius);
          const found = index.nearest(at[0], at[1], () => true);
          const expected = slowNearest(ra, dec, at, radius);
          if (expected < 0) expect(found).toBe(-1);
          else {
            expect(found).toBeGreaterThanOrEqual(0);
            const distance = (star: number) => separation_deg(at[0], at[1], ra[star], dec[star]);
            expect(distance(found)).toBe(distance(expected));
          }
        },
      ),
      { seed: 20261108, numRuns: 500 },
    );
  });

  it('reaches across the pole and across RA 0', () => {
    const index = new ZoneIndex(Float64Array.of(180, 359.9999), Float64Array.of(89.9999, 10), 0, 2, 0.0003);
    expect(index.nearest(0, 89.9999, () => true)).toBe(0);
    expect(index.nearest(0.0001, 10, () => true)).toBe(1);
    expect(index.nearest(0.001, 10, () => true)).toBe(-1);
  });

  it('takes the next one when the nearest is refused, and leaves out stars without a position', () => {
    const index = new ZoneIndex(
      Float64Array.of(10, 10.0001, Number.NaN),
      Float64Array.of(0, 0, 0),
      0,
      3,
      0.001,
    );
    expect(index.nearest(10, 0, star => star !== 0)).toBe(1);
    expect(index.nearest(10, 0, star => star > 1)).toBe(-1);
  });

  it('knows separations: 1 degree of declination, 60 degrees around the equator, pole to pole', () => {
    expect(separation_deg(10, 20, 10, 21)).toBeCloseTo(1, 12);
    expect(separation_deg(350, 0, 50, 0)).toBeCloseTo(60, 10);
    expect(separation_deg(0, -90, 77, 90)).toBeCloseTo(180, 6);
  });
});
