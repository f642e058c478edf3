import { standardAir } from '../../science/sky/air.js';
import { altitudeOfAirmass_deg } from '../../science/sky/airmass.js';
import { refractionFactor } from '../../science/sky/refraction.js';
import type { Site } from '../settings.js';
import type { HorizonLine } from './horizon.js';

const RADIAN = Math.PI / 180;

/** Where a telescope may look, as the sines and cosines that paths are compared with. */
export interface SkyLimits {
  readonly lowest_deg: number;
  readonly sinLowest: number;
  /** What sets it: 'airmass 2.3' or '25 deg'. */
  readonly lowestWords: string;
  /** Sine of the altitude above which the mount cannot follow; 1: everywhere it can. */
  readonly sinHighest: number;
  readonly zenithLimit_deg: number;
  readonly horizon: HorizonLine;
  /** Sine of the highest corner: above it the horizon need not be looked at. */
  readonly sinHorizonTop: number;
  /** Of the site's air: corners of a horizon are seen through it, altitudes of paths are without it. */
  readonly refractionFactor: number;
  readonly cosMoon: number;
  readonly moonDistance_deg: number;
}

export function limitsOf(site: Site): SkyLimits {
  const airmassLimit_deg = altitudeOfAirmass_deg(site.maxAirmass);
  const byAirmass = airmassLimit_deg > site.minAltitude_deg;
  const lowest_deg = Math.max(site.minAltitude_deg, airmassLimit_deg);
  const top_deg = Math.max(0, ...site.horizon.map(([, altitude_deg]) => altitude_deg));
  return {
    lowest_deg,
    sinLowest: Math.sin(lowest_deg * RADIAN),
    lowestWords: byAirmass
      ? `airmass ${site.maxAirmass.toFixed(1)}`
      : `${site.minAltitude_deg.toFixed(0)} deg`,
    sinHighest: Math.cos(site.zenithLimit_deg * RADIAN),
    zenithLimit_deg: site.zenithLimit_deg,
    horizon: site.horizon,
    sinHorizonTop: Math.sin(top_deg * RADIAN),
    refractionFactor: refractionFactor(standardAir(site.height_m)),
    cosMoon: Math.cos(site.moonDistance_deg * RADIAN),
    moonDistance_deg: site.moonDistance_deg,
  };
}
