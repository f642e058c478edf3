import { describe, expect, it } from 'vitest';
import { BV_AXES, classifyAll } from '../support/star-inputs.js';

/** Where the kinds of stars lie in the diagram: facts of the trade, found in any textbook. */
const at = (absMag: number, bv: number) => {
  const v = absMag + 5;
  return { mags: { V: v, B: v + bv }, parallax_mas: 10, parallaxSigma_mas: 0.1 };
};

describe('the corners of the HR diagram', () => {
  const [hotFaint, coolLuminous, blueLuminous, sunLike, redLuminous, coolFaint] = classifyAll(
    [at(11.5, 0.05), at(0.7, 1.05), at(-7, 0.02), at(4.8, 0.65), at(-5.8, 1.75), at(9, 1.44)],
    ['B', 'V'],
    BV_AXES,
  );
  it('hot and faint is a white dwarf', () => expect(hotFaint.odds.WD).toBeGreaterThan(0.95));
  it('cool and luminous is a giant', () => expect(coolLuminous.odds.III).toBeGreaterThan(0.95));
  it('hot and very luminous is a blue supergiant', () => {
    expect(blueLuminous.odds.Ib + blueLuminous.odds.Iab + blueLuminous.odds.Ia).toBeGreaterThan(0.9);
    expect(blueLuminous.text).toMatch(/^A/);
  });
  it('cool and very luminous is a red supergiant', () => {
    expect(redLuminous.odds.Ib + redLuminous.odds.Iab + redLuminous.odds.Ia).toBeGreaterThan(0.9);
  });
  it('like the Sun is a G dwarf', () => expect(sunLike.text).toMatch(/^G\d V/));
  it('cool and faint is an M or late K dwarf', () => expect(coolFaint.text).toMatch(/^(K[7-9]|M\d) V/));
});
