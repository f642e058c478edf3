import type { Profile } from '../follow/settings.js';
import { Ephemeris } from '../follow/sky/ephemeris.js';
import { nightOf } from '../follow/sky/night-of.js';
import { NightSky } from '../follow/sky/window.js';

/** The sky over the site, kept for the running night and made anew for the next. */
export class SkyNow {
  readonly ephemeris: Ephemeris;
  private sky: NightSky | undefined;
  /** Since when the kept sky is the one that counts. */
  private from_ms = Number.NaN;

  constructor(private readonly profile: Profile) {
    this.ephemeris = new Ephemeris(profile.site);
  }

  at(now_ms: number): NightSky {
    const known = this.sky;
    if (known !== undefined && now_ms >= this.from_ms && now_ms < known.night.nextNoon_ms) return known;
    const night = nightOf(this.ephemeris, this.profile.site, now_ms);
    this.sky = new NightSky(this.ephemeris, this.profile.site, night);
    // In the morning it is the coming night that counts, though its noon is still ahead.
    this.from_ms = Math.min(now_ms, night.noon_ms);
    return this.sky;
  }
}
