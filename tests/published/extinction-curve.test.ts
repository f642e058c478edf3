import { describe, expect, it } from 'vitest';
import { slabExtinction_AV } from '../../src/science/dust-slab.js';
import { parseTable } from '../../src/science/table.js';
import extinctionText from '../../src/tables/extinction.csv';

/**
 * The mean curve of Cardelli, Clayton & Mathis 1989, ApJ 345, 245 (equations 2 and 3), R_V = 3.1, written out here as an
 * independent check of the coefficients the program uses.
 */
function ccm89(wavelength_nm: number): number {
  const x = 1000 / wavelength_nm;
  const ratio = (a: number, b: number) => a + b / 3.1;
  if (x <= 1.1) return ratio(0.574 * x ** 1.61, -0.527 * x ** 1.61);
  const y = x - 1.82;
  const series = (coefficients: number[]) => coefficients.reduceRight((sum, c) => sum * y + c, 0);
  return ratio(
    series([1, 0.17699, -0.50447, -0.02427, 0.72085, 0.01979, -0.7753, 0.32999]),
    series([0, 1.41338, 2.28305, 1.07233, -5.38434, -0.62251, 5.3026, -2.09002]),
  );
}

describe('extinction by band', () => {
  it('the curve itself: 1.3245 at 440 nm, 0.9989 at 550, 0.4788 at 900, 0.1135 at 2200 nm (CCM89)', () => {
    expect(ccm89(440)).toBeCloseTo(1.3245, 3);
    expect(ccm89(550)).toBeCloseTo(0.9989, 3);
    expect(ccm89(900)).toBeCloseTo(0.4788, 3);
    expect(ccm89(2200)).toBeCloseTo(0.1135, 3);
  });

  it('coefficients of Schlafly & Finkbeiner 2011 lie within 10 % of that curve at the pivot wavelengths', () => {
    const rows = parseTable(extinctionText).rows.filter(row => row.text('adopted_from') === 'SF11');
    expect(rows.length).toBe(18);
    for (const row of rows) {
      const ratio = row.number('A_over_AV') / ccm89(row.number('lambda_nm'));
      expect(Math.abs(ratio - 1), row.text('band')).toBeLessThan(0.1);
    }
  });
});

describe('the dust slab', () => {
  const slab = { extinction_AVPerKpc: 0.8, scaleHeight_pc: 120, latitude_deg: 30, patchiness: 0.4 };

  it('is the sum of exp(-z/h) along the line of sight (added up in steps of a tenth of a parsec)', () => {
    let sum = 0;
    for (let d = 0.05; d < 500; d += 0.1) sum += 0.1 * 0.0008 * Math.exp((-d * 0.5) / 120);
    expect(slabExtinction_AV(slab, 500)).toBeCloseTo(sum, 5);
  });

  it('grows as the distance near by, and stops at a0 h / sin b', () => {
    expect(slabExtinction_AV(slab, 1)).toBeCloseTo(0.0008, 5);
    expect(slabExtinction_AV(slab, 1e6)).toBeCloseTo((0.0008 * 120) / 0.5, 9);
    expect(slabExtinction_AV({ ...slab, latitude_deg: 0 }, 2000)).toBeCloseTo(1.6, 9);
    expect(slabExtinction_AV({ ...slab, latitude_deg: -30 }, 500)).toBe(slabExtinction_AV(slab, 500));
  });
});
