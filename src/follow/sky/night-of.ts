import type { Site } from '../settings.js';
import type { Ephemeris } from './ephemeris.js';

const DAY_MS = 86_400_000;
/** Upper limb on the horizon: 34 arcmin of refraction and 16 of radius (the usual definition). */
const SUNSET_ALTITUDE_DEG = -0.8333;
/** A search that starts on a passing may find it again; one this much later does not. */
const PAST_MS = 30_000;

/** One night of a site, Unix ms; NaN where something does not happen (polar day or night). */
export interface Night {
  /** The solar noons before and after. */
  readonly noon_ms: number;
  readonly nextNoon_ms: number;
  readonly sunset_ms: number;
  readonly sunrise_ms: number;
  readonly civil: Twilight;
  readonly nautical: Twilight;
  readonly astronomical: Twilight;
  /** When exposures may run: the Sun below the site's own limit. Both NaN: not at all. */
  readonly dark: Twilight;
}

export interface Twilight {
  /** End of dusk: the Sun sinks below the limit. */
  readonly dusk_ms: number;
  /** Beginning of dawn: it rises above it again. */
  readonly dawn_ms: number;
}

/** The night a time belongs to: the running one, else the coming one. */
export function nightOf(ephemeris: Ephemeris, site: Site, time_ms: number): Night {
  const noon = lastNoon(site, time_ms);
  const sunrise = sunBelow(ephemeris, noon, SUNSET_ALTITUDE_DEG).dawn_ms;
  return nightFrom(ephemeris, site, time_ms > sunrise ? noon + DAY_MS : noon);
}

function nightFrom(ephemeris: Ephemeris, site: Site, noon: number): Night {
  const below = (altitude_deg: number) => sunBelow(ephemeris, noon, altitude_deg);
  const down = below(SUNSET_ALTITUDE_DEG);
  return {
    noon_ms: noon,
    nextNoon_ms: noon + DAY_MS,
    sunset_ms: down.dusk_ms === noon ? Number.NaN : down.dusk_ms,
    sunrise_ms: down.dawn_ms === noon + DAY_MS ? Number.NaN : down.dawn_ms,
    civil: below(-6),
    nautical: below(-12),
    astronomical: below(-18),
    dark: below(site.sunLimit_deg),
  };
}

/**
 * Longest stretch between two noons with the Sun below an altitude; both NaN when there is none. Near the poles it may
 * begin or end at a noon, and the Sun may come up for minutes at either.
 */
function sunBelow(ephemeris: Ephemeris, noon: number, altitude_deg: number): Twilight {
  const nextNoon = noon + DAY_MS;
  const nextPassing = (rising: boolean, from_ms: number) =>
    from_ms < nextNoon
      ? ephemeris.nextSunAltitude_ms(rising, altitude_deg, from_ms, (nextNoon - from_ms) / DAY_MS)
      : Number.NaN;
  let longest: Twilight = { dusk_ms: Number.NaN, dawn_ms: Number.NaN };
  let dusk = ephemeris.sunAltitude_deg(noon) < altitude_deg ? noon : nextPassing(false, noon);
  while (dusk < nextNoon) {
    const rise = nextPassing(true, dusk + PAST_MS);
    const dawn = Number.isNaN(rise) ? nextNoon : Math.min(rise, nextNoon);
    if (!(dawn - dusk <= longest.dawn_ms - longest.dusk_ms)) longest = { dusk_ms: dusk, dawn_ms: dawn };
    dusk = nextPassing(false, dawn + PAST_MS);
  }
  return longest;
}

/** Mean solar noon before a time; the equation of time does not matter here. */
function lastNoon(site: Site, time_ms: number): number {
  const offset = DAY_MS / 2 - (site.longitude_deg / 360) * DAY_MS;
  return Math.floor((time_ms - offset) / DAY_MS) * DAY_MS + offset;
}

/** 'dark 18:42-05:58 UT', or why it is not. */
export function darkWords(night: Night): string {
  const { dusk_ms, dawn_ms } = night.dark;
  if (Number.isNaN(dusk_ms)) return 'no dark time: the Sun stays too high all night';
  if (dawn_ms - dusk_ms >= DAY_MS) return 'dark around the clock';
  return `dark ${clock(dusk_ms)}-${clock(dawn_ms)} UT`;
}

/** Hours and minutes, UT. */
export function clock(time_ms: number): string {
  return Number.isNaN(time_ms)
    ? '--:--'
    : new Date(Math.round(time_ms / 60_000) * 60_000).toISOString().slice(11, 16);
}
