import { makePlan } from '../../src/follow/plan/make-plan.js';
import type { PlanNight, PlanTarget } from '../../src/follow/plan/plan.js';
import type { Site } from '../../src/follow/settings.js';
import { Ephemeris } from '../../src/follow/sky/ephemeris.js';
import { nightOf } from '../../src/follow/sky/night-of.js';
import { NightSky, type StarTonight } from '../../src/follow/sky/window.js';
import { SITE } from '../support/site.js';

const EVENING = Date.UTC(2026, 10, 24, 20);
const MINUTE_MS = 60_000;
const STARS = 2000;

/** Stars all over the sky, by the golden angle. */
const place = (i: number): readonly [number, number] => [
  (i * 137.50776) % 360,
  (Math.asin(1 - (2 * (i + 0.5)) / STARS) * 180) / Math.PI,
];

function skyOver(site: Site): NightSky {
  const ephemeris = new Ephemeris(site);
  return new NightSky(ephemeris, site, nightOf(ephemeris, site, EVENING));
}

/** Windows of 2,000 stars over a site; the horizon, if wanted, has a corner every ten degrees. */
export function windowsOfMany(withHorizon: boolean): readonly StarTonight[] {
  const horizon = Array.from({ length: 36 }, (_, i) => [i * 10, 25 + ((i * 7) % 20)] as const);
  const sky = skyOver(withHorizon ? { ...SITE, horizon } : SITE);
  return Array.from({ length: STARS }, (_, i) => sky.follow(...place(i), EVENING));
}

/** Sixty of the stars that have windows, with times on target that grow towards either end of a window. */
export function planOfSixty(stars: readonly StarTonight[]): number {
  const targets = stars
    .filter(({ spans }) => spans.length > 0)
    .filter((_, i) => i % 10 === 0)
    .slice(0, 60)
    .map(
      ({ spans, whyNever, whyEnds }, i): PlanTarget => ({
        id: `s${i}`,
        merit: 1 + ((i * 7) % 10),
        windows: spans,
        duration_ms: start => {
          const middle = (spans[0][0] + spans[spans.length - 1][1]) / 2;
          return (8 + (i % 5) * 9 + Math.abs(start - middle) / (30 * MINUTE_MS)) * MINUTE_MS;
        },
        closes: whyEnds,
        whyNever,
      }),
    );
  const night: PlanNight = {
    now_ms: EVENING,
    dark: [[EVENING, EVENING + 600 * MINUTE_MS]],
    breaks: [],
    setup_ms: () => 4 * MINUTE_MS,
  };
  return makePlan(targets, night).blocks.length;
}
