import { describe, expect, it } from 'vitest';
import { standardAir } from '../../../src/science/sky/air.js';
import { dispersion_arcsec } from '../../../src/science/sky/dispersion.js';
import { parallacticAngle_deg } from '../../../src/science/sky/parallactic-angle.js';
import { refraction_deg } from '../../../src/science/sky/refraction.js';

const RADIAN = Math.PI / 180;

describe('the standard atmosphere', () => {
  // U.S. Standard Atmosphere 1976, table I: hPa at geopotential heights.
  it.each([
    [0, 1013.25],
    [1000, 898.76],
    [2000, 795.01],
    [5000, 540.48],
  ])('at %i m: %f hPa', (height_m, pressure_hPa) => {
    expect(Math.abs(standardAir(height_m).pressure_hPa - pressure_hPa)).toBeLessThan(0.5);
  });
});

describe('the parallactic angle', () => {
  it('is that of the hour angle: Meeus 1998, eq. 14.1', () => {
    for (const phi of [-62, -5, 19, 46.2]) {
      for (const dec of [-40, 3, 71]) {
        for (const hour of [-100, -31, 4, 65]) {
          const [p, d, h] = [phi * RADIAN, dec * RADIAN, hour * RADIAN];
          const up = Math.sin(p) * Math.sin(d) + Math.cos(p) * Math.cos(d) * Math.cos(h);
          const north = Math.cos(p) * Math.sin(d) - Math.sin(p) * Math.cos(d) * Math.cos(h);
          const azimuth = Math.atan2(-Math.cos(d) * Math.sin(h), north) / RADIAN;
          const expected = Math.atan2(Math.sin(h), Math.tan(p) * Math.cos(d) - Math.sin(d) * Math.cos(h));
          expect(parallacticAngle_deg(phi, Math.asin(up) / RADIAN, azimuth)).toBeCloseTo(
            expected / RADIAN,
            8,
          );
        }
      }
    }
  });

  it('is nil in the south and half a turn between zenith and pole, for a northern site', () => {
    expect(parallacticAngle_deg(46, 30, 180)).toBeCloseTo(0, 10);
    expect(Math.abs(parallacticAngle_deg(46, 70, 0))).toBeCloseTo(180, 10);
  });
});

describe('the air', () => {
  it('spreads no light at the zenith, lifts blue above red, and bends less the higher a star stands', () => {
    const air = standardAir(2000);
    expect(dispersion_arcsec(400, 500, 0, air)).toBe(0);
    expect(dispersion_arcsec(400, 500, 50, air)).toBeGreaterThan(0);
    expect(dispersion_arcsec(700, 500, 50, air)).toBeLessThan(0);
    expect(refraction_deg(10)).toBeGreaterThan(refraction_deg(40));
    expect(refraction_deg(-1.01)).toBeNaN();
  });
});
