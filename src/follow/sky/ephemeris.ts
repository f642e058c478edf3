import * as Astronomy from 'astronomy-engine';
import type { Site } from '../settings.js';
import { azimuthOf_deg, type Direction, directionOf, dot, type HorizonAxes } from './direction.js';

/** TT - UTC, seconds, since 2017: 37 leap seconds + 32.184. */
const TT_MINUS_UTC_S = 69.184;
/** Speed of light, au per day. */
const LIGHT_AU_PER_DAY = 173.1446326846693;
const MS_PER_DAY = 86_400_000;
const RADIAN = Math.PI / 180;

/**
 * Where things stand in the sky of a site. Sun, Moon and the Earth's orientation from astronomy-engine, which
 * agrees with IAU 2006/2000A to arcseconds once its estimate of Delta T is replaced by the announced value.
 */
export class Ephemeris {
  private readonly observer: Astronomy.Observer;

  constructor(site: Pick<Site, 'latitude_deg' | 'longitude_deg' | 'height_m'>) {
    // The library keeps this setting for the whole process; setting it again changes nothing.
    Astronomy.SetDeltaTFunction(() => TT_MINUS_UTC_S);
    this.observer = new Astronomy.Observer(site.latitude_deg, site.longitude_deg, site.height_m);
  }

  /** The horizon's axes of date: precession, nutation and the turning of the Earth. */
  horizonAxes(time_ms: number): HorizonAxes {
    const { rot } = Astronomy.Rotation_EQJ_HOR(timeOf(time_ms), this.observer);
    const axis = (i: number): Direction => [rot[0][i], rot[1][i], rot[2][i]];
    return { north: axis(0), west: axis(1), up: axis(2) };
  }

  /** Airless altitude and azimuth (from north through east) of a star, degrees. */
  starPlace(direction: Direction, time_ms: number): { altitude_deg: number; azimuth_deg: number } {
    const axes = this.horizonAxes(time_ms);
    const apparent = this.aberrationAt(time_ms)(direction);
    const north = dot(axes.north, apparent);
    const west = dot(axes.west, apparent);
    return {
      altitude_deg: Math.atan2(dot(axes.up, apparent), Math.hypot(north, west)) / RADIAN,
      azimuth_deg: azimuthOf_deg(north, west),
    };
  }

  /** Turns directions into those seen from the moving Earth: light comes from up to 20.5 arcsec ahead. */
  aberrationAt(time_ms: number): (direction: Direction) => Direction {
    const { vx, vy, vz } = Astronomy.BaryState(Astronomy.Body.Earth, timeOf(time_ms));
    return ([a, b, c]) => {
      const x = a + vx / LIGHT_AU_PER_DAY;
      const y = b + vy / LIGHT_AU_PER_DAY;
      const z = c + vz / LIGHT_AU_PER_DAY;
      const length = Math.hypot(x, y, z);
      return [x / length, y / length, z / length];
    };
  }

  sunAltitude_deg(time_ms: number): number {
    return this.bodyPlace(Astronomy.Body.Sun, time_ms).altitude;
  }

  moonAltitude_deg(time_ms: number): number {
    return this.bodyPlace(Astronomy.Body.Moon, time_ms).altitude;
  }

  /** Illuminated share of the Moon's disc, 0 new, 1 full. */
  moonIllumination(time_ms: number): number {
    return Astronomy.Illumination(Astronomy.Body.Moon, timeOf(time_ms)).phase_fraction;
  }

  /** Angle Sun-Moon-Earth: 0 full, 180 new. */
  moonPhaseAngle_deg(time_ms: number): number {
    return Astronomy.Illumination(Astronomy.Body.Moon, timeOf(time_ms)).phase_angle;
  }

  /** Direction of the Moon from the site itself (parallax up to a degree), J2000. */
  moonDirection(time_ms: number): Direction {
    const place = Astronomy.Equator(Astronomy.Body.Moon, timeOf(time_ms), this.observer, false, true);
    return directionOf(place.ra * 15, place.dec);
  }

  /** Next time after `from_ms` that the Sun's centre passes an airless altitude, within `days`; NaN: it does not. */
  nextSunAltitude_ms(rising: boolean, altitude_deg: number, from_ms: number, days: number): number {
    return this.nextAltitude_ms(Astronomy.Body.Sun, rising, altitude_deg, from_ms, days);
  }

  /** Next time that the Moon's centre passes the airless horizon: what matters is its light, not its limb. */
  nextMoonRiseOrSet_ms(rising: boolean, from_ms: number, days: number): number {
    return this.nextAltitude_ms(Astronomy.Body.Moon, rising, 0, from_ms, days);
  }

  private nextAltitude_ms(
    body: Astronomy.Body,
    rising: boolean,
    altitude_deg: number,
    from_ms: number,
    days: number,
  ): number {
    const direction = rising ? 1 : -1;
    const found = Astronomy.SearchAltitude(
      body,
      this.observer,
      direction,
      timeOf(from_ms),
      days,
      altitude_deg,
    );
    return found === null ? Number.NaN : found.date.getTime();
  }

  private bodyPlace(body: Astronomy.Body, time_ms: number): Astronomy.HorizontalCoordinates {
    const time = timeOf(time_ms);
    const place = Astronomy.Equator(body, time, this.observer, true, true);
    return Astronomy.Horizon(time, this.observer, place.ra, place.dec);
  }
}

function timeOf(time_ms: number): Astronomy.AstroTime {
  // The library counts days from 2000 January 1, 12 h UTC.
  return new Astronomy.AstroTime(time_ms / MS_PER_DAY - 10_957.5);
}
