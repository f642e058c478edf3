import { describe, expect, it } from 'vitest';
import { horizonAltitude_deg } from '../../../src/follow/sky/horizon.js';

describe('the horizon of a site', () => {
  it('is straight between its corners, and round through north', () => {
    const line = [
      [40, 10],
      [100, 40],
      [300, 20],
    ] as const;
    expect(horizonAltitude_deg(line, 40)).toBe(10);
    expect(horizonAltitude_deg(line, 70)).toBeCloseTo(25, 12);
    expect(horizonAltitude_deg(line, 200)).toBeCloseTo(30, 12);
    // From 300 on to 40: a hundred degrees from 20 down to 10.
    expect(horizonAltitude_deg(line, 350)).toBeCloseTo(15, 12);
    expect(horizonAltitude_deg(line, 0)).toBeCloseTo(14, 12);
    expect(horizonAltitude_deg(line, 39.9)).toBeCloseTo(10.01, 12);
  });

  it('may be one height all round, closed at 0 and 360, upright at a wall, or not there', () => {
    expect(horizonAltitude_deg([[120, 12]], 5)).toBe(12);
    const closed = [
      [0, 20],
      [180, 30],
      [360, 20],
    ] as const;
    expect(horizonAltitude_deg(closed, 0)).toBe(20);
    expect(horizonAltitude_deg(closed, 359.99)).toBeCloseTo(20, 2);
    const wall = [
      [90, 5],
      [90, 50],
      [180, 50],
      [180, 5],
    ] as const;
    expect(horizonAltitude_deg(wall, 89.99)).toBeCloseTo(5, 2);
    expect(horizonAltitude_deg(wall, 90)).toBe(50);
    expect(horizonAltitude_deg(wall, 180)).toBe(5);
    expect(horizonAltitude_deg([], 77)).toBe(0);
  });
});
