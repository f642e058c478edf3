import { clock } from './night-of.js';
import type { NightFrame, StarPath } from './star-path.js';

/** After the end of a window, where the limit that ended it surely holds. */
const LATER_MS = 1000;

/** Why a star has no window any more. */
export function whyNever(path: StarPath, frame: NightFrame, sunLimit_deg: number, now_ms: number): string {
  const { grid, limits } = frame;
  const limit = limits.lowest_deg.toFixed(0);
  if (grid.times.length === 0) return 'no dark time tonight: the Sun stays too high';
  if (now_ms >= grid.until_ms) {
    return `the night is over (Sun above ${sunLimit_deg} deg since ${clock(grid.until_ms)} UT)`;
  }
  const lastHigh = path.highSpans().at(-1);
  const highest_deg = path.highest_deg();
  if (lastHigh === undefined) {
    return highest_deg >= limits.lowest_deg
      ? `behind the site's horizon whenever it is above ${limit} deg (highest ${Math.floor(highest_deg)} deg)`
      : `never above ${limit} deg in the dark (highest ${Math.floor(highest_deg)} deg)`;
  }
  const [, until] = lastHigh;
  if (until <= now_ms) {
    const where = path.isAboveLowest(until + LATER_MS) ? "behind the site's horizon" : `below ${limit} deg`;
    return `${where} since ${clock(until)} UT`;
  }
  const nearest_deg = path.nearestMoon_deg();
  if (nearest_deg >= limits.moonDistance_deg)
    return `within ${limits.zenithLimit_deg} deg of the zenith, where the mount cannot follow`;
  return `the Moon is too near (${nearest_deg.toFixed(0)} deg, limit ${limits.moonDistance_deg} deg)`;
}

/** Why a window ends at a time, to go before 'at 02:14 UT'. */
export function whyEnds(path: StarPath, { grid, limits, moonTurns }: NightFrame, until_ms: number): string {
  const after = until_ms + LATER_MS;
  if (after >= grid.until_ms) return 'the dark ends';
  if (!path.isAboveLowest(after)) return `sets below ${limits.lowestWords}`;
  if (!path.isHigh(after)) return "goes behind the site's horizon";
  if (path.isNearZenith(after)) return `comes within ${limits.zenithLimit_deg} deg of the zenith`;
  if (moonTurns.some(time => Math.abs(time - until_ms) < LATER_MS))
    return `the Moon rises within ${limits.moonDistance_deg} deg`;
  return `the Moon comes within ${limits.moonDistance_deg} deg`;
}

/** Why an observation does not fit into a window. */
export function whyTooShort(from_ms: number, until_ms: number, now_ms: number, wall_s: number): string {
  const left = Math.round((until_ms - Math.max(from_ms, now_ms)) / 60_000);
  return `needs ${Math.round(wall_s / 60)} min, only ${left} min before ${clock(until_ms)} UT`;
}
