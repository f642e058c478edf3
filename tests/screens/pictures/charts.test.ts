import { describe, expect, it } from 'vitest';
import { CLASSES, type StarClass } from '../../../src/science/classes.js';
import { lightCurvePicture } from '../../../src/screens/pictures/light-curve.js';
import { oddsBars } from '../../../src/screens/pictures/odds-bars.js';

const HOUR_MS = 3_600_000;

function curve(mags: readonly number[], times = mags.map((_, i) => i * HOUR_MS)) {
  return {
    band: 'V' as const,
    time_ms: Float64Array.from(times),
    mag: Float64Array.from(mags),
    sigma_mag: new Float64Array(mags.length).fill(0.02),
  };
}

const rowsOf = (text: string) => text.split('\n');

describe('the light curve', () => {
  it('has bright on top', () => {
    const lines = rowsOf(lightCurvePicture(curve([14, 13]), 40, 12, 'ascii').toPlainText());
    const [bright, faint] = [
      lines.findIndex(line => line.includes('o')),
      lines.findLastIndex(line => line.includes('o')),
    ];
    expect(lines[bright].indexOf('o')).toBeGreaterThan(lines[faint].indexOf('o'));
    expect(lines[faint].indexOf('o')).toBeGreaterThan(0);
  });

  it('shows every reading of a night, with times below', () => {
    const text = lightCurvePicture(curve([14, 13.5, 13.8, 14.1]), 60, 12, 'ascii').toPlainText();
    expect(rowsOf(text).slice(1).join('').match(/o/g)).toHaveLength(4);
    expect(text).toContain('01:00');
    expect(text).toContain('4 readings');
  });

  it('does not blow up the noise of a constant star to the full height', () => {
    const lines = rowsOf(lightCurvePicture(curve([14, 14.001, 14, 14.001]), 60, 15, 'ascii').toPlainText());
    expect(lines.slice(1).filter(line => line.includes('o')).length).toBeLessThanOrEqual(2);
  });

  it('draws with no reading, one reading, equal readings and unknown values', () => {
    expect(lightCurvePicture(curve([]), 50, 10, 'braille').toPlainText()).toContain('no readings');
    expect(lightCurvePicture(curve([Number.NaN, 14]), 40, 10, 'ascii').toPlainText()).toContain('1 reading,');
    const equal = lightCurvePicture(curve([14, 14, 14]), 40, 10, 'ascii').toPlainText();
    expect(rowsOf(equal).slice(1).join('').match(/o/g)).toHaveLength(3);
    const sameTime = lightCurvePicture(curve([14, 13], [0, 0]), 40, 10, 'ascii').toPlainText();
    expect(sameTime).toContain('2 readings');
  });

  it('holds nothing but ASCII where only that can be shown', () => {
    expect(lightCurvePicture(curve([14, 13, 15]), 60, 12, 'ascii').toPlainText()).toMatch(/^[\x20-\x7e\n]*$/);
  });
});

describe('bars of odds', () => {
  const odds = (parts: Partial<Record<StarClass, number>>) =>
    Object.fromEntries(CLASSES.map(name => [name, parts[name] ?? 0])) as Record<StarClass, number>;
  const textOf = (parts: Partial<Record<StarClass, number>>, most = 5) =>
    oddsBars(odds(parts), 31, most, 'ascii').map(line => line.map(part => part.text).join(''));

  it('are as long as the odds, most probable first', () => {
    expect(textOf({ III: 0.75, IV: 0.25 })).toEqual([
      'III   ===============.....   0.75'.replace('   0.75', ' 0.75'),
      'IV    =====............... 0.25',
    ]);
  });

  it('leave out what is next to nothing, and say when there are none', () => {
    expect(textOf({ V: 0.999, III: 0.001 })).toHaveLength(1);
    expect(textOf({})).toEqual(['no odds: too few measurements']);
    expect(textOf({ V: 0.4, IV: 0.3, III: 0.3 }, 2)).toHaveLength(2);
  });
});
