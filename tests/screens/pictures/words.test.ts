import { describe, expect, it } from 'vitest';
import { FLAG_CODES } from '../../../src/follow/flags/index.js';
import { asciiText } from '../../../src/screens/pictures/ascii-only.js';
import {
  exposureShort,
  exposureWords,
  flagLabel,
  nextTarget,
  startByShort,
  startByWords,
  withoutOdds,
} from '../../../src/screens/pictures/star-words.js';
import {
  durationText,
  grouped,
  leftText,
  signed,
  toWidth,
  withSigma,
  wrapped,
} from '../../../src/screens/pictures/text.js';
import { exposure, NOW_MS, nightView, TOO_FAINT } from '../../support/night-view.js';

describe('numbers', () => {
  it('carry as many digits as their error allows', () => {
    expect(withSigma(11.3149, 0.1512, '±')).toBe('11.31 ± 0.15');
    expect(withSigma(5.7123, 0.08, '±')).toBe('5.71 ± 0.08');
    expect(withSigma(16_512, 903, '±')).toBe('16512 ± 903');
    expect(withSigma(Number.NaN, 1, '±')).toBe('-');
  });

  it('signs, groups, durations', () => {
    expect(signed(-0.04, 1)).toBe('+0.0');
    expect(signed(11.31, 1)).toBe('+11.3');
    expect(grouped(1_204_120)).toBe('1 204 120');
    expect([45, 900, 7500].map(durationText)).toEqual(['45 s', '15 min', '2 h 05 min']);
    expect(leftText(NOW_MS, NOW_MS + 125 * 60_000)).toBe('2h05');
    expect(leftText(NOW_MS, NOW_MS + 59_000)).toBe('now');
  });

  it('text is cut with a sign, and broken between words', () => {
    expect(toWidth('NS-0501', 5)).toBe('NS-0…');
    expect(toWidth('NS', 5)).toBe('NS   ');
    expect(wrapped('one two three', 7)).toEqual(['one two', 'three']);
    expect(wrapped('incomprehensible', 7)).toEqual(['incomp…']);
    expect(asciiText('5 ± 1 ─ x…')).toBe('5 ? 1 - x~');
  });
});

describe('words about a star', () => {
  it('every flag has a label that fits its column', () => {
    for (const code of FLAG_CODES) expect(flagLabel(code).length).toBeLessThanOrEqual(14);
  });

  it('how long, and why not', () => {
    expect(exposureShort(exposure('imager V', 3, 240))).toBe('3 x 240 s');
    expect(exposureShort(TOO_FAINT)).toBe('too faint');
    expect(exposureWords(TOO_FAINT)).toBe('low-resolution spectrum: too faint: S/N 11 at most in 90 min');
    expect(exposureWords(undefined)).toBe('no follow-up setup in the profile');
    expect(withoutOdds('G8 IV/III 0.55/0.41')).toBe('G8 IV/III');
  });

  it('until when, and why not', () => {
    const [open, soon, later, , blocked] = nightView().shortlist.map(entry => entry.window);
    expect(startByShort(open, NOW_MS)).toBe('by 03:42');
    expect(startByWords(soon, NOW_MS)).toBe('start by 03:00 UT, 19 min left');
    expect(startByWords(later, NOW_MS)).toBe('from 03:28 UT (in 47 min), start by 05:32 UT');
    expect(startByWords(blocked, NOW_MS)).toBe('cannot be observed: below 30 deg since 02:12 UT');
    expect(startByShort(soon, NOW_MS + 1_200_000)).toBe('too late');
  });

  it('the next target is the best that can be begun now', () => {
    const [white, hot, later, , blocked] = nightView().shortlist;
    expect(nextTarget([blocked, later, hot, white], NOW_MS)).toBe(hot);
    expect(nextTarget([blocked, later], NOW_MS)).toBe(blocked);
    expect(nextTarget([], NOW_MS)).toBeUndefined();
  });
});
