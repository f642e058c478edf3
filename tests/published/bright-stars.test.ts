import { describe, expect, it } from 'vitest';
import { scoreBrightStars } from '../support/luminosity-groups.js';

/** data/bright_stars.csv: real stars, from memory; hot stars are many among them, and colours are all that is given. */
describe('bright stars with published types', () => {
  const score = scoreBrightStars();

  it('are many', () => expect(score.stars).toBeGreaterThan(140));

  it('come out in their luminosity group in three of four cases, from B-V and parallax alone', () => {
    expect(score.right / score.stars).toBeGreaterThan(0.75);
  });

  it('are not claimed with much more certainty than that', () => {
    expect(score.stated - score.right / score.stars).toBeLessThan(0.1);
  });

  it('dwarfs nine times in ten, white dwarfs always, supergiants and giants two times in three', () => {
    const share = (group: Parameters<typeof score.byGroup.get>[0]) => {
      const { stars, right } = score.byGroup.get(group) ?? { stars: 0, right: 0 };
      return right / stars;
    };
    expect(share('dwarf')).toBeGreaterThan(0.9);
    expect(share('white dwarf')).toBe(1);
    expect(share('supergiant')).toBeGreaterThan(0.66);
    expect(share('giant')).toBeGreaterThan(0.66);
  });
});
