import { describe, expect, it } from 'vitest';
import { makePlan } from '../../../src/follow/plan/make-plan.js';
import type { PlanTarget } from '../../../src/follow/plan/plan.js';
import { directionOf } from '../../../src/follow/sky/direction.js';
import { Ephemeris } from '../../../src/follow/sky/ephemeris.js';
import { nightOf } from '../../../src/follow/sky/night-of.js';
import { NightSky } from '../../../src/follow/sky/window.js';
import { airmass } from '../../../src/science/sky/airmass.js';
import { SITE } from '../../support/site.js';

const MINUTE_MS = 60_000;
const NOW = Date.UTC(2026, 10, 24, 19);
const site = { ...SITE, maxAirmass: 2, minAltitude_deg: 20, moonDistance_deg: 0 };
const ephemeris = new Ephemeris(site);
const sky = new NightSky(ephemeris, site, nightOf(ephemeris, site, NOW));
const { dusk_ms, dawn_ms } = sky.night.dark;

/** A star whose exposures grow with the air before it, as those of a star do. */
function starTarget(id: string, ra: number, dec: number, zenith_min: number, merit: number): PlanTarget {
  const { spans, whyNever, whyEnds } = sky.follow(ra, dec, NOW);
  return {
    id,
    merit,
    windows: spans,
    duration_ms: start => {
      const { altitude_deg } = ephemeris.starPlace(directionOf(ra, dec), start);
      return zenith_min * airmass(altitude_deg) * MINUTE_MS;
    },
    closes: whyEnds,
    whyNever,
  };
}

const plan = (targets: readonly PlanTarget[], now_ms = NOW) =>
  makePlan(targets, { now_ms, dark: [[dusk_ms, dawn_ms]], breaks: [], setup_ms: () => 4 * MINUTE_MS });

describe('a plan under a real sky', () => {
  it('takes a sinking star before a rising one, each within its airmass', () => {
    const { blocks } = plan([starTarget('rising', 130, 20, 40, 5), starTarget('sinking', 340, 10, 40, 5)]);
    expect(blocks.map(({ id }) => id)).toEqual(['sinking', 'rising']);
    for (const [i, [ra, dec]] of [
      [340, 10],
      [130, 20],
    ].entries()) {
      for (const time of [blocks[i].start_ms, blocks[i].end_ms]) {
        const { altitude_deg } = ephemeris.starPlace(directionOf(ra, dec), time);
        expect(airmass(altitude_deg)).toBeLessThan(2.001);
      }
    }
  });

  it('says at what airmass and when a star sets that cannot be finished any more', () => {
    const late = sky.follow(340, 10, NOW).spans[0][1] - 30 * MINUTE_MS;
    const { unplaced } = plan([starTarget('sinking', 340, 10, 40, 5)], late);
    expect(unplaced[0].reason).toMatch(
      /^sets below airmass 2\.0 at \d\d:\d\d UT, needs (7[0-9]|80) min from \d\d:\d\d$/,
    );
    expect(plan([starTarget('south', 80, -60, 5, 5)]).unplaced[0].reason).toMatch(
      /^never above 30 deg in the dark/,
    );
  });

  it('takes the minutes of the hour: the same star needs longer low than high', () => {
    const star = starTarget('star', 60, 40, 30, 5);
    const { blocks } = plan([star]);
    const culminating = plan([star], dusk_ms + (dawn_ms - dusk_ms) / 2);
    const length = (found: typeof blocks) => found[0].end_ms - found[0].start_ms;
    expect(length(blocks)).toBeGreaterThan(1.02 * length(culminating.blocks));
  });
});
