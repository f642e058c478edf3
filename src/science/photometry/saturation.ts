/** Electrons a pixel can hold and tell: its well, or where the digits end. */
export function pixelLimit_e(fullWell_e: number, bits: number, gain_ePerAdu: number): number {
  return Math.min(fullWell_e, (2 ** bits - 1) * gain_ePerAdu);
}

/** Time in which the brightest pixel of a star, with the background under it, collects `limit_e` electrons. */
export function saturationTime_s(
  limit_e: number,
  peak_ePerS: number,
  background_ePerSPerPixel: number,
): number {
  return limit_e / (peak_ePerS + background_ePerSPerPixel);
}
