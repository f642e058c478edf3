import { describe, expect, it } from 'vitest';
import type { Site } from '../../../src/follow/settings.js';
import { Ephemeris } from '../../../src/follow/sky/ephemeris.js';
import { clock, darkWords, nightOf } from '../../../src/follow/sky/night-of.js';
import { SITE } from '../../support/site.js';

const DAY_MS = 86_400_000;
const SAMPLE_MS = 300_000;

const nightAt = (site: Site, time_ms: number) => nightOf(new Ephemeris(site), site, time_ms);

describe('the night of a time', () => {
  it('is the running one until sunrise, then the coming one', () => {
    const evening = nightAt(SITE, Date.UTC(2026, 10, 24, 21));
    const names = [
      nightAt(SITE, evening.sunrise_ms - 60_000),
      nightAt(SITE, evening.sunset_ms - 3_600_000),
      nightAt(SITE, evening.sunrise_ms + 60_000),
    ].map(night => night.noon_ms);
    expect(names).toEqual([evening.noon_ms, evening.noon_ms, evening.noon_ms + DAY_MS]);
  });

  it('goes down in order: sunset, civil, nautical, dark, astronomical', () => {
    const { sunset_ms, civil, nautical, dark, astronomical, sunrise_ms } = nightAt(
      SITE,
      Date.UTC(2026, 2, 3, 21),
    );
    const order = [
      sunset_ms,
      civil.dusk_ms,
      nautical.dusk_ms,
      dark.dusk_ms,
      astronomical.dusk_ms,
      astronomical.dawn_ms,
      dark.dawn_ms,
      nautical.dawn_ms,
      civil.dawn_ms,
      sunrise_ms,
    ];
    expect(order).toEqual([...order].sort((a, b) => a - b));
    expect(darkWords({ ...nightAt(SITE, Date.UTC(2026, 2, 3, 21)) })).toMatch(
      /^dark \d\d:\d\d-\d\d:\d\d UT$/,
    );
  });

  // Around the days on which the Sun begins to stay up or down, at which dusk or dawn alone happens.
  it.each([60, 68, 78, 89.5, -89])('latitude %f: dark as long as the sampled Sun says', latitude_deg => {
    for (const sunLimit_deg of [-6, -12, -15]) {
      const site = { ...SITE, latitude_deg, sunLimit_deg };
      const ephemeris = new Ephemeris(site);
      for (let day = 0; day < 366; day += 6) {
        const night = nightOf(ephemeris, site, Date.UTC(2026, 0, 1, 18) + day * DAY_MS);
        let below = 0;
        for (let time = night.noon_ms; time < night.nextNoon_ms; time += SAMPLE_MS) {
          if (ephemeris.sunAltitude_deg(time) < sunLimit_deg) below++;
        }
        const { dusk_ms, dawn_ms } = night.dark;
        const dark = Number.isNaN(dusk_ms) ? 0 : (dawn_ms - dusk_ms) / SAMPLE_MS;
        expect(Math.abs(dark - below), `day ${day}, limit ${sunLimit_deg}`).toBeLessThan(4);
        expect(darkWords(night)).not.toMatch(/NaN|--/);
      }
    }
  });

  it('the first day of a polar night is dark from dusk on, not light', () => {
    const site = { ...SITE, latitude_deg: 75, longitude_deg: 15, sunLimit_deg: -0.8333 };
    const { dark, sunset_ms, sunrise_ms } = nightAt(site, Date.UTC(2026, 10, 5, 18));
    expect(dark.dawn_ms - dark.dusk_ms).toBeGreaterThan(20 * 3_600_000);
    expect(Number.isNaN(sunset_ms) || Number.isNaN(sunrise_ms)).toBe(true);
  });

  it('a time that does not happen is no number on the clock', () => expect(clock(Number.NaN)).toBe('--:--'));
});
