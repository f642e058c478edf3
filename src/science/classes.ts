/**
 * The classes that odds are given for: MK luminosity classes, and the sequences beside them.
 * WD white dwarf, sd metal-poor subdwarf, sdOB hot subdwarf, none: fits no known sequence.
 */
export const CLASSES = ['V', 'IV', 'III', 'II', 'Ib', 'Iab', 'Ia', 'WD', 'sd', 'sdOB', 'none'] as const;

export type StarClass = (typeof CLASSES)[number];

export const CLASS_COUNT = CLASSES.length;

export const CLASS_INDEX: Readonly<Record<StarClass, number>> = Object.fromEntries(
  CLASSES.map((name, index) => [name, index]),
) as Record<StarClass, number>;
