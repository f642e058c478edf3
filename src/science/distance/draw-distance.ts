import type { Random } from '../random.js';

/** Integral of r^2 exp(-r/L) from 0 to r. */
export function coneVolume(r: number, scale: number): number {
  const x = r / scale;
  return scale ** 3 * (2 - Math.exp(-x) * (x * x + 2 * x + 2));
}

/** Distance, pc, of a star in a cone whose density falls as exp(-r/scale_pc); never nearer than 5 pc. */
export function drawDistance_pc(random: Random, farthest_pc: number, scale_pc: number): number {
  const target = random.uniform() * coneVolume(farthest_pc, scale_pc);
  let low = 0;
  let high = farthest_pc;
  for (let step = 0; step < 50; step++) {
    const middle = (low + high) / 2;
    if (coneVolume(middle, scale_pc) < target) low = middle;
    else high = middle;
  }
  return Math.max(5, (low + high) / 2);
}
