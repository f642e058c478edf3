import type { Profile } from '../follow/settings.js';
import { Ephemeris } from '../follow/sky/ephemeris.js';
import { nightOf } from '../follow/sky/night-of.js';
import { NightSky } from '../follow/sky/window.js';

/** The sky over the site, kept for the running night and made anew for the next. */
export class SkyNow {
  readonly ephemeris: Ephemeris;
  private sky: NightSky | undefined;

  constructor(private readonly profile: Profile) {
    this.ephemeris = new Ephemeris(profile.site);
  }

  at(now_ms: number): NightSky {
    const known = this.sky;
    if (known !== undefined && now_ms >= known.night.noon_ms && now_ms < known.night.nextNoon_ms)
      return known;
    this.sky = new NightSky(
      this.ephemeris,
      this.profile.site,
      nightOf(this.ephemeris, this.profile.site, now_ms),
    );
    return this.sky;
  }
}
