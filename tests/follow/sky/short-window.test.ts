import { describe, expect, it } from 'vitest';
import type { Site } from '../../../src/follow/settings.js';
import { directionOf } from '../../../src/follow/sky/direction.js';
import { Ephemeris } from '../../../src/follow/sky/ephemeris.js';
import { nightOf } from '../../../src/follow/sky/night-of.js';
import type { Span } from '../../../src/follow/sky/time-grid.js';
import { NightSky } from '../../../src/follow/sky/window.js';
import { SITE } from '../../support/site.js';

const SLOW_MS = 10_000;
const GRID_MS = 5 * 60_000;
/** The last quarter: the Moon rises in the middle of the night. */
const EVENING = Date.UTC(2026, 11, 1, 21);
const ephemeris = new Ephemeris(SITE);
const night = nightOf(ephemeris, SITE, EVENING);
const { dusk_ms, dawn_ms } = night.dark;

/** Altitude of a horizon by going along it in small steps: nothing of the program's own. */
function lineAt(corners: Site['horizon'], azimuth_deg: number): number {
  if (corners.length === 0) return 0;
  const round = [
    [corners.at(-1)![0] - 360, corners.at(-1)![1]],
    ...corners,
    [corners[0][0] + 360, corners[0][1]],
  ];
  for (let i = 1; i < round.length; i++) {
    const [[a, low], [b, high]] = [round[i - 1], round[i]];
    if (azimuth_deg >= a && azimuth_deg < b) return low + ((azimuth_deg - a) / (b - a)) * (high - low);
  }
  return Number.NaN;
}

/** Windows by looking every ten seconds. */
function slowSpans(site: Site, ra: number, dec: number): Span[] {
  const star = ephemeris.aberrationAt(dusk_ms)(directionOf(ra, dec));
  const isOpen = (time: number) => {
    const { altitude_deg, azimuth_deg } = ephemeris.starPlace(directionOf(ra, dec), time);
    if (altitude_deg < Math.max(site.minAltitude_deg, lineAt(site.horizon, azimuth_deg))) return false;
    if (altitude_deg > 90 - site.zenithLimit_deg) return false;
    const [x, y, z] = ephemeris.moonDirection(time);
    const moon_deg = (Math.acos(x * star[0] + y * star[1] + z * star[2]) * 180) / Math.PI;
    return moon_deg >= site.moonDistance_deg || ephemeris.moonAltitude_deg(time) <= 0;
  };
  const spans: [number, number][] = [];
  let before = false;
  for (let time = dusk_ms; time < dawn_ms; time += SLOW_MS) {
    const open = isOpen(time);
    if (open && !before) spans.push([time, time]);
    if (open) spans[spans.length - 1][1] = time;
    before = open;
  }
  return spans;
}

/** Compares with the slow search, and gives the lengths found, minutes. */
function lengths(site: Site, ra: number, dec: number): number[] {
  const { spans } = new NightSky(ephemeris, site, night).follow(ra, dec, dusk_ms);
  const slow = slowSpans(site, ra, dec);
  expect(spans.length, `${ra} ${dec}`).toBe(slow.length);
  for (const [i, [from, until]] of spans.entries()) {
    expect(Math.abs(from - slow[i][0])).toBeLessThan(2 * SLOW_MS);
    expect(Math.abs(until - slow[i][1])).toBeLessThan(2 * SLOW_MS);
  }
  return spans.map(([from, until]) => (until - from) / 60_000);
}

/** Right ascension that culminates so long after dusk. */
function culminating(minutes: number): number {
  const { up } = ephemeris.horizonAxes(dusk_ms + minutes * 60_000);
  return ((Math.atan2(up[1], up[0]) * 180) / Math.PI + 360) % 360;
}

/** Eight times within one step of the grid, so that no place of the grid is spared. */
const PLACES = Array.from({ length: 8 }, (_, i) => 130 + (i * GRID_MS) / 60_000 / 8);

describe('windows shorter than the grid are found, against a search every ten seconds', () => {
  it('a star that just tops the limit', () => {
    const open = { ...SITE, moonDistance_deg: 0 };
    // J2000 declination that culminates 0.001 deg above 30 deg, precession of the day included.
    const found = PLACES.flatMap(minutes => {
      const ra = culminating(minutes);
      const top = ephemeris.starPlace(directionOf(ra, -13.8), dusk_ms + minutes * 60_000).altitude_deg;
      return lengths(open, ra, -13.8 + (30 - top) + 0.001);
    });
    expect(found).toHaveLength(PLACES.length);
    expect(found.every(length => length > 1 && length < 4)).toBe(true);
  });

  it('a star that rises minutes before the Moon, which is too near', () => {
    const limits = { ...SITE, moonDistance_deg: 120 };
    const moonrise = ephemeris.nextMoonRiseOrSet_ms(true, dusk_ms, 1);
    const found = PLACES.flatMap((_, i) => {
      // Rises above 30 deg in the east quarters of a minute before the Moon does above the horizon.
      const before_ms = moonrise - (i + 1) * 15_000;
      let ra = culminating((before_ms - dusk_ms) / 60_000);
      const at = () => ephemeris.starPlace(directionOf(ra, 20), before_ms).altitude_deg;
      while (at() > 30) ra += 0.01;
      return lengths(limits, ra % 360, 20);
    });
    expect(found.filter(length => length < 4.5).length).toBe(PLACES.length);
  });

  it('a gap between two trees', () => {
    const ra = culminating(130);
    const { azimuth_deg } = ephemeris.starPlace(directionOf(ra, 5), dusk_ms + 200 * 60_000);
    const found = PLACES.flatMap((_, i) => {
      const gap = azimuth_deg + i * 0.18;
      const horizon = [
        [0, 20],
        [gap - 0.6, 60],
        [gap - 0.3, 20],
        [gap + 0.1, 20],
        [gap + 0.4, 60],
        [gap + 15, 60],
        [gap + 15, 20],
      ] as const;
      return lengths({ ...SITE, moonDistance_deg: 0, horizon }, ra, 5);
    });
    expect(found.filter(length => length < 5).length).toBeGreaterThanOrEqual(PLACES.length);
  });

  it('a dead zone at the zenith that is crossed in less than five minutes', () => {
    const found = PLACES.map(minutes => {
      const ra = culminating(minutes);
      return lengths({ ...SITE, moonDistance_deg: 0, zenithLimit_deg: 0.4 }, ra, SITE.latitude_deg - 0.1);
    });
    expect(found.every(spans => spans.length === 2)).toBe(true);
  });
});

describe('what ends a window is told', () => {
  const whyEnds = (site: Site, ra: number, dec: number) => {
    const { spans, whyEnds: words } = new NightSky(ephemeris, site, night).follow(ra, dec, dusk_ms);
    return spans.map(([, until]) => words(until));
  };
  const open = { ...SITE, moonDistance_deg: 0 };

  it('altitude, airmass, dawn, horizon, zenith, Moon', () => {
    const ra = culminating(200);
    expect(whyEnds(open, ra, 10)).toEqual(['sets below 30 deg']);
    expect(whyEnds({ ...open, maxAirmass: 1.8 }, ra, 10)).toEqual(['sets below airmass 1.8']);
    expect(whyEnds(open, ra, 85)).toEqual(['the dark ends']);
    const walled = {
      ...open,
      horizon: [
        [180, 0],
        [181, 80],
        [270, 80],
        [271, 0],
      ] as const,
    };
    expect(whyEnds(walled, ra, 10)).toEqual(["goes behind the site's horizon"]);
    expect(whyEnds({ ...open, zenithLimit_deg: 2 }, ra, SITE.latitude_deg)).toEqual([
      'comes within 2 deg of the zenith',
      'sets below 30 deg',
    ]);
    const moon = ephemeris.moonDirection(dawn_ms);
    const moonRa = ((Math.atan2(moon[1], moon[0]) * 180) / Math.PI + 360) % 360;
    expect(whyEnds({ ...SITE, moonDistance_deg: 60 }, moonRa - 20, 30)).toContain(
      'the Moon rises within 60 deg',
    );
    // The Moon moves by half a degree an hour: a star in its way is free until it is near.
    const other = nightOf(ephemeris, SITE, Date.UTC(2026, 10, 24, 21));
    const sky = new NightSky(ephemeris, SITE, other);
    const [x, y, z] = ephemeris.moonDirection((other.dark.dusk_ms + other.dark.dawn_ms) / 2);
    const ahead_deg = (Math.atan2(y, x) * 180) / Math.PI + SITE.moonDistance_deg / Math.sqrt(1 - z * z);
    const ahead = sky.follow((ahead_deg + 360) % 360, (Math.asin(z) * 180) / Math.PI, other.dark.dusk_ms);
    expect(ahead.spans.map(([, until]) => ahead.whyEnds(until))).toContain('the Moon comes within 30 deg');
  });

  it('a star that stays behind the horizon or in the dead zone says so', () => {
    const why = (site: Site, ra: number, dec: number) =>
      new NightSky(ephemeris, site, night).follow(ra, dec, dusk_ms).whyNever();
    const ra = culminating(200);
    const pit = { ...open, horizon: [[0, 70]] as const };
    expect(why(pit, ra, 10)).toMatch(
      /^behind the site's horizon whenever it is above 30 deg \(highest 5\d deg\)$/,
    );
    const { spans } = new NightSky(ephemeris, pit, night).follow(ra, SITE.latitude_deg, dusk_ms);
    expect(spans).toHaveLength(1);
    const narrow = { ...open, minAltitude_deg: 80, zenithLimit_deg: 15 };
    expect(why(narrow, ra, SITE.latitude_deg)).toBe(
      'within 15 deg of the zenith, where the mount cannot follow',
    );
  });
});
