import { describe, expect, it } from 'vitest';
import { directionOf } from '../../src/follow/sky/direction.js';
import { Ephemeris } from '../../src/follow/sky/ephemeris.js';
import { airmass } from '../../src/science/sky/airmass.js';
import { parallacticAngle_deg } from '../../src/science/sky/parallactic-angle.js';
import { refraction_deg } from '../../src/science/sky/refraction.js';
import { parseTable } from '../../src/science/table.js';
import text from './data/checks_altaz.csv';

/** Astropy 5.2.1 / ERFA 2.0 at invented sites; tolerances stand in the head of the file. */
describe('altitude, azimuth, Sun and Moon against Astropy', () => {
  const rows = parseTable(text).rows;
  it('covers ninety places and times', () => expect(rows.length).toBe(90));

  it.each(rows.map(row => [`row ${row.text('row')} ${row.text('site')} ${row.text('utc')}`, row] as const))(
    '%s',
    (_, row) => {
      const ephemeris = new Ephemeris({
        latitude_deg: row.number('lat_deg'),
        longitude_deg: row.number('lon_east_deg'),
        height_m: row.number('height_m'),
      });
      const time_ms = Date.parse(`${row.text('utc')}Z`);
      const direction = directionOf(row.number('ra_icrs_deg'), row.number('dec_icrs_deg'));
      const place = ephemeris.starPlace(direction, time_ms);
      const cosine = Math.cos((place.altitude_deg * Math.PI) / 180);
      expect(Math.abs(place.altitude_deg - row.number('alt_true_deg'))).toBeLessThan(0.001);
      const turn = Math.abs(((place.azimuth_deg - row.number('az_deg') + 540) % 360) - 180);
      expect(turn * cosine).toBeLessThan(0.001);
      if (!Number.isNaN(row.number('X_y94_true'))) {
        expect(Math.abs(airmass(place.altitude_deg) / row.number('X_y94_true') - 1)).toBeLessThan(0.001);
      }
      const q = parallacticAngle_deg(row.number('lat_deg'), place.altitude_deg, place.azimuth_deg);
      expect(Math.abs(((q - row.number('parang_deg') + 540) % 360) - 180)).toBeLessThan(0.05);
      if (!Number.isNaN(row.number('refr_arcmin'))) {
        const refraction_arcmin = 60 * refraction_deg(place.altitude_deg);
        expect(Math.abs(refraction_arcmin - row.number('refr_arcmin'))).toBeLessThan(0.002);
        const seen_deg = place.altitude_deg + refraction_arcmin / 60;
        expect(Math.abs(seen_deg - row.number('alt_app_deg'))).toBeLessThan(0.001);
      }
      expect(Math.abs(ephemeris.moonAltitude_deg(time_ms) - row.number('moon_alt_deg'))).toBeLessThan(0.01);
      expect(Math.abs(ephemeris.sunAltitude_deg(time_ms) - row.number('sun_alt_deg'))).toBeLessThan(0.003);
      expect(Math.abs(ephemeris.moonIllumination(time_ms) - row.number('moon_illum'))).toBeLessThan(0.0003);
      const phaseAngle = ephemeris.moonPhaseAngle_deg(time_ms);
      expect(Math.abs(phaseAngle - row.number('moon_phase_angle_deg'))).toBeLessThan(0.02);
      const moon = ephemeris.moonDirection(time_ms);
      const star = ephemeris.aberrationAt(time_ms)(direction);
      const separation =
        (Math.acos(moon[0] * star[0] + moon[1] * star[1] + moon[2] * star[2]) * 180) / Math.PI;
      // The library's apparent Moon and the star are both of date and aberrated: compare to 0.02 degrees.
      expect(Math.abs(separation - row.number('moon_sep_deg'))).toBeLessThan(0.02);
    },
  );
});
