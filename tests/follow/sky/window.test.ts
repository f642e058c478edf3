import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Site } from '../../../src/follow/settings.js';
import { directionOf } from '../../../src/follow/sky/direction.js';
import { Ephemeris } from '../../../src/follow/sky/ephemeris.js';
import { darkWords, nightOf } from '../../../src/follow/sky/night-of.js';
import { NightSky } from '../../../src/follow/sky/window.js';
import { SITE } from '../../support/site.js';

const NOW = Date.UTC(2026, 10, 24, 21);

function skyAt(site: Site, time_ms: number) {
  const ephemeris = new Ephemeris(site);
  return { ephemeris, sky: new NightSky(ephemeris, site, nightOf(ephemeris, site, time_ms)) };
}

describe('windows', () => {
  const { ephemeris, sky } = skyAt(SITE, NOW);
  const star = fc.record({
    ra: fc.double({ min: 0, max: 359.9, noNaN: true }),
    dec: fc.double({ min: -40, max: 85, noNaN: true }),
    wall_s: fc.integer({ min: 0, max: 10_000 }),
  });

  it('never reach into daylight, below the limits, or near the Moon', () => {
    fc.assert(
      fc.property(star, fc.double({ min: 0.02, max: 0.98, noNaN: true }), ({ ra, dec, wall_s }, share) => {
        const window = sky.windowFor(sky.follow(ra, dec, NOW), wall_s);
        if (Number.isNaN(window.upFrom_ms)) {
          expect(window.blockedBy).not.toBe('');
          return;
        }
        const time = window.upFrom_ms + share * (window.upUntil_ms - window.upFrom_ms);
        const { altitude_deg } = ephemeris.starPlace(directionOf(ra, dec), time);
        expect(altitude_deg).toBeGreaterThan(SITE.minAltitude_deg - 0.01);
        expect(ephemeris.sunAltitude_deg(time)).toBeLessThan(SITE.sunLimit_deg + 0.01);
        if (ephemeris.moonAltitude_deg(time) > 0.5) {
          expect(sky.geometryAt(ra, dec, time).separation_deg).toBeGreaterThan(SITE.moonDistance_deg - 0.2);
        }
      }),
      { numRuns: 150, seed: 5 },
    );
  });

  it('begin and end within 20 s of where a slow search puts them, Moonrise and Moonset included', () => {
    const limits = { ...SITE, moonDistance_deg: 60 };
    // The last quarter: the Moon rises in the middle of the night.
    const night = nightOf(ephemeris, SITE, Date.UTC(2026, 11, 1, 21));
    const { dusk_ms, dawn_ms } = night.dark;
    const strict = new NightSky(ephemeris, limits, night);
    const moon = ephemeris.moonDirection(dusk_ms);
    const moonRa = ((Math.atan2(moon[1], moon[0]) * 180) / Math.PI + 360) % 360;
    const slow_ms = 10_000;
    let edges = 0;
    let moonEdges = 0;
    for (let i = 0; i < 9; i++) {
      const [ra, dec] = [(moonRa + 295 + (i % 6) * 10) % 360, -3 + i * 8];
      const direction = ephemeris.aberrationAt(dusk_ms)(directionOf(ra, dec));
      const moonAway = (time: number) => {
        const [x, y, z] = ephemeris.moonDirection(time);
        const cosine = x * direction[0] + y * direction[1] + z * direction[2];
        return (Math.acos(cosine) * 180) / Math.PI >= 60 || ephemeris.moonAltitude_deg(time) <= 0;
      };
      const high = (time: number) => ephemeris.starPlace(directionOf(ra, dec), time).altitude_deg >= 30;
      const slow: number[] = [];
      let before = false;
      for (let time = dusk_ms; time < dawn_ms; time += slow_ms) {
        const away = moonAway(time);
        const good = high(time) && away;
        if (good !== before && time > dusk_ms) {
          slow.push(time - slow_ms / 2);
          if (away !== moonAway(time - slow_ms)) moonEdges++;
        }
        before = good;
      }
      const found = strict
        .follow(ra, dec, dusk_ms)
        .spans.flat()
        .filter(time => time > dusk_ms && time < dawn_ms);
      expect(found.length, `star ${i}`).toBe(slow.length);
      for (const [k, time] of found.entries()) expect(Math.abs(time - slow[k])).toBeLessThan(20_000);
      edges += found.length;
    }
    expect(edges).toBeGreaterThan(8);
    expect(moonEdges).toBeGreaterThan(2);
  });

  it('the latest start still completes, and not a minute later', () => {
    fc.assert(
      fc.property(star, ({ ra, dec, wall_s }) => {
        const { startBy_ms, upUntil_ms, upFrom_ms, blockedBy } = sky.windowFor(
          sky.follow(ra, dec, NOW),
          wall_s,
        );
        if (Number.isNaN(startBy_ms)) {
          expect(blockedBy).not.toBe('');
          return;
        }
        expect(startBy_ms + wall_s * 1000).toBeCloseTo(upUntil_ms, 3);
        expect(startBy_ms).toBeGreaterThanOrEqual(Math.max(NOW, upFrom_ms));
      }),
      { numRuns: 150, seed: 6 },
    );
  });

  it('says why there is none', () => {
    const words = (ra: number, dec: number, wall_s = 0) =>
      sky.windowFor(sky.follow(ra, dec, NOW), wall_s).blockedBy;
    expect(words(60, -40)).toMatch(/^never above 30 deg in the dark \(highest -?\d+ deg\)$/);
    expect(words(130, 24, 60_000)).toMatch(/^needs 1000 min, only \d+ min before \d\d:\d\d UT$/);
    const moon = ephemeris.moonDirection(NOW);
    const ra = (Math.atan2(moon[1], moon[0]) * 180) / Math.PI;
    expect(words((ra + 360) % 360, (Math.asin(moon[2]) * 180) / Math.PI)).toMatch(
      /^the Moon is too near \(\d+ deg, limit 30 deg\)$/,
    );
  });

  it('polar day and polar night have words, not numbers that are none', () => {
    const north = { ...SITE, latitude_deg: 78.2 };
    const summer = skyAt(north, Date.UTC(2026, 5, 21, 12));
    expect(darkWords(summer.sky.night)).toBe('no dark time: the Sun stays too high all night');
    expect(summer.sky.windowFor(summer.sky.follow(60, 60, Date.UTC(2026, 5, 21, 12)), 0).blockedBy).toMatch(
      /no dark time tonight/,
    );
    const pole = { ...SITE, latitude_deg: 89, sunLimit_deg: -15 };
    expect(darkWords(skyAt(pole, Date.UTC(2026, 11, 21, 12)).sky.night)).toBe('dark around the clock');
  });
});
