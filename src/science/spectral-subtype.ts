/**
 * Spectral subtypes as one running number, so that means and spreads can be taken: O0 = 0, B0 = 10, A0 = 20,
 * F0 = 30, G0 = 40, K0 = 50, M0 = 60, L0 = 70, T0 = 80; the digit is added.
 */
export const SPECTRAL_LETTERS = ['O', 'B', 'A', 'F', 'G', 'K', 'M', 'L', 'T'] as const;

/** Number of a type such as 'K2.5III'; NaN where the text does not begin with a letter and a digit. */
export function subtypeNumber(type: string): number {
  const match = /^([OBAFGKMLT])(\d(?:\.\d)?)/.exec(type);
  if (match === null) return Number.NaN;
  return SPECTRAL_LETTERS.indexOf(match[1] as (typeof SPECTRAL_LETTERS)[number]) * 10 + Number(match[2]);
}

/** Text of a subtype number, to whole subtypes: 52.3 -> 'K2'. Empty for NaN. */
export function subtypeText(subtype: number): string {
  if (Number.isNaN(subtype)) return '';
  const whole = Math.max(0, Math.min(89, Math.round(subtype)));
  return `${SPECTRAL_LETTERS[Math.floor(whole / 10)]}${whole % 10}`;
}
