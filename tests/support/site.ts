import type { Site } from '../../src/follow/settings.js';

/** An invented site in the north. */
export const SITE: Site = {
  name: 'invented',
  latitude_deg: 46.2,
  longitude_deg: 9.3,
  height_m: 1650,
  timeZone: 'UTC',
  minAltitude_deg: 30,
  maxAirmass: 2.5,
  sunLimit_deg: -15,
  zenithLimit_deg: 0,
  horizon: [],
  moonDistance_deg: 30,
  seeing_arcsec: 1.5,
};
