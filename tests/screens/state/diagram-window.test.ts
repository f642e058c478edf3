import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  type DiagramWindow,
  holding,
  panned,
  wholeWindow,
  zoomed,
} from '../../../src/screens/state/diagram-window.js';
import { starInDirection } from '../../../src/screens/state/nearest-star.js';
import { nightView, starColumns } from '../../support/night-view.js';

const PLAIN = { sigma: 0.1, starClass: 'V', odds: 0.9, subtype: 42, teff_K: 5800 } as const;

function starsAt(...places: readonly (readonly [number, number])[]) {
  return starColumns(
    places.map(([colour, absMag], i) => ({ ...PLAIN, id: `S${i}`, colour, absMag })),
    0,
  );
}

describe('the window of the diagram', () => {
  it('holds every star and ends at whole steps', () => {
    const { stars } = nightView();
    const window = wholeWindow({ stars });
    for (let star = 0; star < stars.count; star++) {
      expect(stars.colour[star]).toBeGreaterThan(window.colourFrom);
      expect(stars.colour[star]).toBeLessThan(window.colourTo);
      expect(stars.absMag[star]).toBeGreaterThan(window.magFrom);
      expect(stars.absMag[star]).toBeLessThan(window.magTo);
    }
    expect(window.magFrom % 1).toBeCloseTo(0, 9);
    expect((window.colourTo * 10) % 1).toBeCloseTo(0, 6);
  });

  it('is a usable one without stars, with one star, with equal stars and with artefacts', () => {
    for (const stars of [
      starsAt(),
      starsAt([Number.NaN, Number.NaN]),
      starsAt([0.6, 4.8]),
      starsAt([0.6, 4.8], [0.6, 4.8]),
      starsAt([0.6, 4.8], [99.999, 99.999]),
    ]) {
      const window = wholeWindow({ stars });
      expect(window.colourTo - window.colourFrom).toBeGreaterThanOrEqual(1.2 - 1e-9);
      expect(window.colourTo).toBeLessThan(7);
      expect(window.magTo - window.magFrom).toBeGreaterThanOrEqual(9 - 1e-9);
    }
  });

  it('zoomed, moved or following a star it stays inside the whole', () => {
    const whole: DiagramWindow = { colourFrom: -0.5, colourTo: 2, magFrom: -7, magTo: 16 };
    const inside = (window: DiagramWindow) => {
      expect(window.colourFrom).toBeGreaterThanOrEqual(whole.colourFrom - 1e-9);
      expect(window.colourTo).toBeLessThanOrEqual(whole.colourTo + 1e-9);
      expect(window.magFrom).toBeGreaterThanOrEqual(whole.magFrom - 1e-9);
      expect(window.magTo).toBeLessThanOrEqual(whole.magTo + 1e-9);
      expect(window.colourTo).toBeGreaterThan(window.colourFrom);
      expect(window.magTo).toBeGreaterThan(window.magFrom);
    };
    fc.assert(
      fc.property(
        fc.array(fc.constantFrom(0.6, 1 / 0.6), { maxLength: 12 }),
        fc.double({ min: -0.5, max: 2, noNaN: true }),
        fc.double({ min: -7, max: 16, noNaN: true }),
        fc.double({ min: -1, max: 1, noNaN: true }),
        (factors, colour, mag, pan) => {
          let window: DiagramWindow | undefined = whole;
          for (const factor of factors) {
            window = zoomed(window ?? whole, whole, factor, colour, mag);
            if (window === undefined) continue;
            inside(window);
            inside(panned(window, whole, pan, -pan));
            const held = holding(window, whole, colour, mag);
            inside(held);
            expect(colour).toBeGreaterThanOrEqual(held.colourFrom - 1e-9);
            expect(colour).toBeLessThanOrEqual(held.colourTo + 1e-9);
          }
        },
      ),
      { seed: 9, numRuns: 200 },
    );
  });
});

describe('the cursor of the diagram', () => {
  const stars = starsAt([0.5, 5], [0.7, 5.2], [1.5, 5], [0.5, 2], [0.501, 5.01], [Number.NaN, 5], [3, 5]);
  const window: DiagramWindow = { colourFrom: 0, colourTo: 2, magFrom: 0, magTo: 10 };
  const go = (from: number, direction: 'left' | 'right' | 'up' | 'down') =>
    starInDirection(stars, window, 40, 20, from, direction);

  it('goes to the nearest star in the direction, past those of its own cell', () => {
    expect(go(0, 'right')).toBe(1);
    expect(go(1, 'right')).toBe(2);
    expect(go(0, 'up')).toBe(3);
  });

  it('stays where it is when no star lies that way inside the window', () => {
    expect(go(2, 'right')).toBe(-1);
    expect(go(3, 'up')).toBe(-1);
  });
});
