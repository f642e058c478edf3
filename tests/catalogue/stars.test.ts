import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { StarCatalogue } from '../../src/catalogue/stars.js';
import { makeFrame, type TestRow } from './input.js';

const ARCSEC = 1 / 3600;

describe('one row per star', () => {
  it('is found again within the radius, and not beyond', () => {
    const catalogue = new StarCatalogue(1.5);
    expect([...catalogue.absorb(makeFrame([{ ra: 10, dec: 0, mag: 12 }], 'V', 0), 0)]).toEqual([0]);
    const again = makeFrame(
      [
        { ra: 10 + 1.4 * ARCSEC, dec: 0, mag: 12 },
        { ra: 10 + 3.1 * ARCSEC, dec: 0, mag: 15 },
      ],
      'V',
      1,
    );
    expect([...catalogue.absorb(again, 1)]).toEqual([0, 1]);
    expect(catalogue.count).toBe(2);
    expect([...catalogue.readings]).toEqual([2, 1]);
    expect([...catalogue.lastFrame]).toEqual([1, 1]);
  });

  it('goes to the closest of two rows, whatever their order', () => {
    const near: TestRow = { ra: 10 + 0.1 * ARCSEC, dec: 0, mag: 12 };
    const far: TestRow = { ra: 10 + 1 * ARCSEC, dec: 0, mag: 15 };
    for (const rows of [
      [near, far],
      [far, near],
    ]) {
      const catalogue = new StarCatalogue(1.5);
      catalogue.absorb(makeFrame([{ ra: 10, dec: 0, mag: 12 }], 'V', 0), 0);
      expect(catalogue.absorb(makeFrame(rows, 'V', 1), 1)[rows.indexOf(near)]).toBe(0);
      expect(catalogue.count).toBe(2);
    }
  });

  it('closes a chain of neighbours so that the closest pairs stay together', () => {
    const catalogue = new StarCatalogue(1.5);
    const stars = [0, 1.2].map(offset => ({ ra: 10 + offset * ARCSEC, dec: 0, mag: 12 }));
    catalogue.absorb(makeFrame(stars, 'V', 0), 0);
    const rows = [0.7, 1.25].map(offset => ({ ra: 10 + offset * ARCSEC, dec: 0, mag: 12 }));
    expect([...catalogue.absorb(makeFrame(rows, 'V', 1), 1)]).toEqual([0, 1]);
  });

  it('pairs as sorting all pairs by separation does', () => {
    const rows = fc.array(fc.integer({ min: 0, max: 60 }), { minLength: 1, maxLength: 12 });
    fc.assert(
      fc.property(rows, rows, (first, second) => {
        // Places on a line in units of 0.1 arcsec, made distinct by a small shift.
        const place = (steps: number, i: number, part: number) =>
          10 + (steps * 0.1 + i * 0.00137 + part) * ARCSEC;
        const stars = first.map((steps, i) => place(steps, i, 0));
        const again = second.map((steps, i) => place(steps, i, 0.0211));
        const catalogue = new StarCatalogue(1);
        const toFrame = (places: number[], k: number) =>
          makeFrame(
            places.map(ra => ({ ra, dec: 0, mag: 12 })),
            'V',
            k,
          );
        catalogue.absorb(toFrame(stars, 0), 0);
        const found = [...catalogue.absorb(toFrame(again, 1), 1)];
        const pairs = again.flatMap((ra, row) =>
          stars.map((s, star) => ({ row, star, apart: Math.abs(ra - s) })),
        );
        const expected = new Array<number>(again.length).fill(-1);
        const taken = new Set<number>();
        for (const { row, star, apart } of pairs.sort((a, b) => a.apart - b.apart)) {
          if (apart > ARCSEC || expected[row] >= 0 || taken.has(star)) continue;
          expected[row] = star;
          taken.add(star);
        }
        expect(found.map(star => (star < stars.length ? star : -1))).toEqual(expected);
      }),
      { seed: 20261108, numRuns: 1000 },
    );
  });

  it('holds across RA 0 and at the pole', () => {
    const catalogue = new StarCatalogue(1.5);
    catalogue.absorb(
      makeFrame(
        [
          { ra: 359.9999, dec: 10 },
          { ra: 0, dec: 89.9999 },
        ].map(r => ({ ...r, mag: 12 })),
        'V',
        0,
      ),
      0,
    );
    const again = [
      { ra: 0.0001, dec: 10 },
      { ra: 180, dec: 89.99995 },
    ].map(row => ({ ...row, mag: 12 }));
    expect([...catalogue.absorb(makeFrame(again, 'V', 1), 1)]).toEqual([0, 1]);
  });

  it('stays right while stars are added frame by frame', () => {
    const catalogue = new StarCatalogue(1);
    const all = Array.from({ length: 4000 }, (_, i) => ({
      ra: 100 + (i % 64) * 0.01,
      dec: -5 + Math.floor(i / 64) * 0.01,
      mag: 15,
    }));
    for (let frame = 0; frame < 8; frame++) {
      const stars = catalogue.absorb(makeFrame(all.slice(0, 500 * (frame + 1)), 'V', frame), frame);
      expect([...stars]).toEqual(Array.from({ length: 500 * (frame + 1) }, (_, i) => i));
    }
    expect(catalogue.count).toBe(4000);
  });
});

describe('identifiers', () => {
  it('find a star that has moved beyond the radius', () => {
    const catalogue = new StarCatalogue(1.5);
    catalogue.absorb(makeFrame([{ id: 'A', ra: 10, dec: 0, mag: 12 }], 'V', 0), 0);
    expect([
      ...catalogue.absorb(makeFrame([{ id: 'A', ra: 10 + 6 * ARCSEC, dec: 0, mag: 12 }], 'V', 1), 1),
    ]).toEqual([0]);
  });

  it('that are running numbers of each file are not believed', () => {
    const catalogue = new StarCatalogue(1.5);
    const places = Array.from({ length: 20 }, (_, i) => 10 + 0.002 * i);
    const numbered = (order: number[]) =>
      makeFrame(
        order.map((ra, i) => ({ id: String(i + 1), ra, dec: 0, mag: 12 })),
        'V',
        0,
      );
    catalogue.absorb(numbered(places), 0);
    const stars = [...catalogue.absorb(numbered(places.toReversed()), 1)];
    expect(stars).toEqual(Array.from({ length: 20 }, (_, i) => 19 - i));
    expect(catalogue.count).toBe(20);
  });

  it('are those of the first file; without one, a designation', () => {
    const catalogue = new StarCatalogue(1.5);
    catalogue.absorb(makeFrame([{ ra: 299.418991667, dec: 33.6411, mag: 12 }], 'V', 0), 0);
    catalogue.absorb(makeFrame([{ id: 'A', ra: 10, dec: 0, mag: 12 }], 'V', 1), 1);
    catalogue.absorb(makeFrame([{ id: 'B', ra: 10, dec: 0, mag: 12 }], 'V', 2), 2);
    expect(catalogue.ids).toEqual(['J195740.55+333827.9', 'A']);
    // Both names now stand for the star, also where a file has no position.
    const nowhere = makeFrame([{ id: 'B', ra: Number.NaN, dec: Number.NaN, mag: 12 }], 'V', 3);
    expect([...catalogue.absorb(nowhere, 3)]).toEqual([1]);
  });

  it('are never given twice', () => {
    const catalogue = new StarCatalogue(1);
    const at = (ra: number) => ({ id: 'A', ra, dec: 0, mag: 12 });
    catalogue.absorb(makeFrame([at(10)], 'V', 0), 0);
    catalogue.absorb(makeFrame([at(20), at(20.0000001)], 'V', 1), 1);
    expect(new Set(catalogue.ids).size).toBe(3);
  });
});

describe('a catalogue without times', () => {
  const photometry = makeFrame(
    [
      { ra: 10, dec: 0, mag: 12 },
      { ra: 11, dec: 0, mag: 13 },
    ],
    'V',
    0,
  );
  const astrometry = makeFrame(
    [
      { ra: 11, dec: 0, parallax: 5, parallaxSigma: 0.1 },
      { ra: 12, dec: 0, parallax: 7, parallaxSigma: 0.1 },
    ],
    'V',
    Number.NaN,
  );

  it.each([[[photometry, astrometry]], [[astrometry, photometry]]])(
    'joins the same stars in either order',
    frames => {
      const catalogue = new StarCatalogue(1.5);
      for (const [index, frame] of frames.entries()) catalogue.absorb(frame, index);
      expect(catalogue.count).toBe(3);
      const star = [...catalogue.ra_deg].indexOf(11);
      expect(catalogue.parallax_mas[star]).toBe(5);
      expect(catalogue.parallax_sigma_mas[star]).toBe(0.1);
      expect(catalogue.mag('V')[star]).toBe(13);
      expect(catalogue.parallax_mas[[...catalogue.ra_deg].indexOf(10)]).toBeNaN();
      expect(catalogue.readingCount).toBe(2);
    },
  );

  it('gives way to a better parallax', () => {
    const catalogue = new StarCatalogue(1.5);
    const at = (parallax: number, parallaxSigma: number) =>
      makeFrame([{ ra: 10, dec: 0, parallax, parallaxSigma }], 'V', 0);
    catalogue.absorb(at(5, 0.5), 0);
    catalogue.absorb(at(6, 0.1), 1);
    catalogue.absorb(at(7, 0.3), 2);
    expect(catalogue.parallax_mas[0]).toBe(6);
  });

  it('gives a position to stars that were known by name only', () => {
    const catalogue = new StarCatalogue(1.5);
    catalogue.absorb(makeFrame([{ id: 'A', ra: Number.NaN, dec: Number.NaN, mag: 12 }], 'V', 0), 0);
    catalogue.absorb(makeFrame([{ id: 'A', ra: 10, dec: 5, mag: 12 }], 'V', 1), 1);
    expect([catalogue.ra_deg[0], catalogue.dec_deg[0]]).toEqual([10, 5]);
    expect([...catalogue.absorb(makeFrame([{ ra: 10, dec: 5, mag: 12 }], 'V', 2), 2)]).toEqual([0]);
  });
});

describe('means', () => {
  const reading = fc.record({
    mag: fc.double({ min: 5, max: 25, noNaN: true }),
    sigma: fc.double({ min: 0.001, max: 0.5, noNaN: true }),
    suspect: fc.boolean(),
  });

  it('are those of a plain computation, with and without a frame', () => {
    fc.assert(
      fc.property(fc.array(reading, { minLength: 1, maxLength: 12 }), fc.nat(11), (all, leaveOut) => {
        const catalogue = new StarCatalogue(1.5);
        for (const [k, one] of all.entries())
          catalogue.absorb(makeFrame([{ ra: 10, dec: 0, ...one }], 'V', k), k);
        expectMeans(catalogue, all);
        catalogue.forget(leaveOut);
        expectMeans(
          catalogue,
          all.filter((_, k) => k !== leaveOut),
        );
      }),
      { seed: 20261108, numRuns: 300 },
    );
  });

  function expectMeans(
    catalogue: StarCatalogue,
    all: readonly { mag: number; sigma: number; suspect: boolean }[],
  ): void {
    const clean = all.filter(one => !one.suspect);
    const counting = clean.length > 0 ? clean : all;
    if (counting.length === 0) {
      expect(catalogue.mag('V')[0]).toBeNaN();
      return;
    }
    const weights = counting.map(one => 1 / one.sigma ** 2);
    const weight = weights.reduce((a, b) => a + b);
    const mean = counting.reduce((sum, one, i) => sum + weights[i] * one.mag, 0) / weight;
    const chi2 = counting.reduce((sum, one, i) => sum + weights[i] * (one.mag - mean) ** 2, 0);
    expect(catalogue.mag('V')[0]).toBeCloseTo(mean, 9);
    expect(catalogue.sigma('V')[0]).toBeCloseTo(1 / Math.sqrt(weight), 9);
    expect(Math.abs(catalogue.chi2('V')[0] - chi2)).toBeLessThanOrEqual(1e-6 * Math.max(1, chi2));
    expect(catalogue.readingsIn('V')[0]).toBe(counting.length);
    expect(catalogue.suspect[0]).toBe(clean.length === 0 ? 1 : 0);
    expect(catalogue.readings[0]).toBe(all.length);
  }

  it('follow a frame that is reduced again, while stars keep their places', () => {
    const catalogue = new StarCatalogue(1.5);
    catalogue.absorb(
      makeFrame(
        [
          { ra: 10, dec: 0, mag: 12 },
          { ra: 11, dec: 0, mag: 14 },
        ],
        'V',
        0,
      ),
      0,
    );
    catalogue.absorb(makeFrame([{ ra: 11, dec: 0, mag: 14 }], 'V', 1), 1);
    expect([...catalogue.absorb(makeFrame([{ ra: 11, dec: 0, mag: 15 }], 'V', 0), 0)]).toEqual([1]);
    expect(catalogue.count).toBe(2);
    expect(catalogue.mag('V')[0]).toBeNaN();
    expect(catalogue.mag('V')[1]).toBeCloseTo(14.5, 12);
    expect(catalogue.readingCount).toBe(2);
    expect([...catalogue.readings]).toEqual([0, 2]);
  });

  it('have no scatter with one reading, none with equal ones, and the known one of 12.0 and 12.2', () => {
    const catalogue = new StarCatalogue(1.5);
    const at = (mag: number, k: number) => makeFrame([{ ra: 10, dec: 0, mag, sigma: 0.01 }], 'V', k);
    catalogue.absorb(at(12, 0), 0);
    expect(catalogue.scatter('V')[0]).toBeNaN();
    catalogue.absorb(at(12, 1), 1);
    expect(catalogue.scatter('V')[0]).toBe(0);
    catalogue.absorb(at(12.2, 1), 1);
    expect(catalogue.scatter('V')[0]).toBeCloseTo(Math.SQRT2 / 10, 9);
  });
});

describe('light curves', () => {
  it('are in order of time, in one band, without files that have no time', () => {
    const catalogue = new StarCatalogue(1.5);
    const star = (mag: number) => [
      { ra: 20, dec: 0, mag: 9 },
      { ra: 10, dec: 0, mag },
    ];
    catalogue.absorb(makeFrame(star(12.3), 'V', 30), 0);
    catalogue.absorb(makeFrame(star(12.1), 'V', 10), 1);
    catalogue.absorb(makeFrame(star(13), 'B', 20), 2);
    catalogue.absorb(makeFrame(star(11), 'V', Number.NaN), 3);
    const curve = catalogue.lightCurve(1, 'V');
    expect([...curve.mag]).toEqual([12.1, 12.3]);
    expect([...curve.frame]).toEqual([1, 0]);
    expect(curve.time_ms[1] - curve.time_ms[0]).toBe(20 * 60_000);
    expect(catalogue.bands).toEqual(['B', 'V']);
  });
});
