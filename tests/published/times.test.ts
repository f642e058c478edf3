import { describe, expect, it } from 'vitest';
import type { Site } from '../../src/follow/settings.js';
import { directionOf } from '../../src/follow/sky/direction.js';
import { Ephemeris } from '../../src/follow/sky/ephemeris.js';
import { nightOf } from '../../src/follow/sky/night-of.js';
import { NightSky } from '../../src/follow/sky/window.js';
import { parseTable, type Row } from '../../src/science/table.js';
import text from './data/checks_times.csv';

/** Astropy 5.2.1 / ERFA 2.0, root finding; 'none' where an event does not happen within 24 h of local noon. */
const rows = parseTable(text).rows;

function siteOf(row: Row): Site {
  return {
    name: row.text('site'),
    latitude_deg: row.number('lat_deg'),
    longitude_deg: row.number('lon_east_deg'),
    height_m: row.number('height_m'),
    timeZone: 'UTC',
    minAltitude_deg: 30,
    maxAirmass: 10,
    sunLimit_deg: -12,
    zenithLimit_deg: 0,
    horizon: [],
    moonDistance_deg: 0,
    seeing_arcsec: 1,
  };
}

const noonOf = (row: Row) => (row.number('noon_start_jd') - 2_440_587.5) * 86_400_000;

function expectTime(found_ms: number, row: Row, slack = 1): void {
  if (row.text('utc') === 'none') {
    // Found events must lie outside the day in question.
    expect(Number.isNaN(found_ms) || found_ms > noonOf(row) + 86_400_000).toBe(true);
    return;
  }
  const difference_s = Math.abs(found_ms - Date.parse(`${row.text('utc')}Z`)) / 1000;
  expect(difference_s).toBeLessThan(Math.max(5, row.number('tol_s')) * slack);
}

describe('twilight, rise and set against Astropy', () => {
  const solar = rows.filter(row => /^(sun|civil|nautical|astronomical)/.test(row.text('event')));
  it('covers the Sun at nineteen nights', () => expect(solar.length).toBe(152));

  it.each(
    solar.map(
      row =>
        [`${row.text('row')} ${row.text('site')} ${row.text('night')} ${row.text('event')}`, row] as const,
    ),
  )('%s', (_, row) => {
    const ephemeris = new Ephemeris(siteOf(row));
    const event = row.text('event');
    const rising = event === 'sunrise' || event.endsWith('_dawn');
    expectTime(ephemeris.nextSunAltitude_ms(rising, row.number('altitude_deg'), noonOf(row), 1), row);
  });

  const lunar = rows.filter(row => /^moon_centre/.test(row.text('event')));
  it('covers the Moon at nineteen nights', () => expect(lunar.length).toBe(38));
  it.each(
    lunar.map(
      row =>
        [`${row.text('row')} ${row.text('site')} ${row.text('night')} ${row.text('event')}`, row] as const,
    ),
  )('%s', (_, row) => {
    expectTime(
      new Ephemeris(siteOf(row)).nextMoonRiseOrSet_ms(row.text('event').includes('rises'), noonOf(row), 1),
      row,
    );
  });
});

const LIMB_ROWS = 38;
const STEP_MS = 60_000;

/** Altitude of a row's target, independent of the windows. */
function altitudeOf(row: Row): (time_ms: number) => number {
  const ephemeris = new Ephemeris(siteOf(row));
  const direction = directionOf(row.number('target_ra_icrs_deg'), row.number('target_dec_icrs_deg'));
  return time_ms => ephemeris.starPlace(direction, time_ms).altitude_deg;
}

describe('altitudes of targets against Astropy', () => {
  const targets = rows.filter(row => row.text('event').startsWith('target_'));
  it('covers three targets at nineteen nights, and no row is left over', () => {
    const others = rows.filter(row =>
      /^(sun|civil|nautical|astronomical|moon_centre)/.test(row.text('event')),
    );
    // The limb of the Moon is not what is asked for: its light begins with its centre.
    expect(rows.filter(row => row.text('event').endsWith('upper_limb_34arcmin'))).toHaveLength(LIMB_ROWS);
    expect(targets).toHaveLength(171);
    expect(targets.length + others.length + LIMB_ROWS).toBe(rows.length);
  });

  it.each(targets.map(row => [`row ${row.text('row')} ${row.text('event')}`, row] as const))(
    '%s',
    (_, row) => {
      const at = altitudeOf(row);
      const sign = row.text('event').startsWith('target_rises') ? 1 : -1;
      if (row.text('utc') === 'none') {
        const minutes = Array.from({ length: 1441 }, (_, i) => at(noonOf(row) + i * STEP_MS));
        const passes = minutes.some(
          (high, i) => i > 0 && sign * (high - 30) >= 0 && sign * (minutes[i - 1] - 30) < 0,
        );
        expect(passes).toBe(false);
        return;
      }
      const time = Date.parse(`${row.text('utc')}Z`);
      const expected_deg = row.number('altitude_deg');
      if (row.text('event') === 'target_transit') {
        expect(Math.abs(at(time) - expected_deg)).toBeLessThan(0.001);
        return;
      }
      // The sky turns by at most 15 arcsec a second: the time agrees if the limit lies between just before and after.
      const slack_ms = 1000 * row.number('tol_s');
      expect(sign * (at(time - slack_ms) - expected_deg)).toBeLessThan(0);
      expect(sign * (at(time + slack_ms) - expected_deg)).toBeGreaterThan(0);
    },
  );
});

describe('windows above 30 degrees against the same crossings', () => {
  const crossings = rows.filter(
    row => /^target_(rises|sets)/.test(row.text('event')) && row.text('utc') !== 'none',
  );
  it('covers enough crossings', () => expect(crossings.length).toBeGreaterThan(40));

  it('every crossing in the dark is an edge of a window, within 20 s', () => {
    let checked = 0;
    for (const row of crossings) {
      const site = siteOf(row);
      const ephemeris = new Ephemeris(site);
      const night = nightOf(ephemeris, site, noonOf(row) + 1000);
      const crossing = Date.parse(`${row.text('utc')}Z`);
      if (!(crossing > night.dark.dusk_ms + 60_000 && crossing < night.dark.dawn_ms - 60_000)) continue;
      checked++;
      const sky = new NightSky(ephemeris, site, night);
      const rises = row.text('event').startsWith('target_rises');
      const around = sky.windowFor(
        sky.follow(
          row.number('target_ra_icrs_deg'),
          row.number('target_dec_icrs_deg'),
          rises ? crossing - 30_000 : crossing - 120_000,
        ),
        0,
      );
      const edge = rises ? around.upFrom_ms : around.upUntil_ms;
      expect(Math.abs(edge - crossing) / 1000, `row ${row.text('row')}`).toBeLessThan(20);
    }
    expect(checked).toBeGreaterThan(15);
  });
});
