import { darkWords } from '../follow/sky/night-of.js';
import { CLASS_COUNT } from '../science/classes.js';
import { letterPositions, spectralTypeText, tracksInAxes } from '../science/odds/index.js';
import { flagBits } from './flag-book.js';
import type { FollowUpDesk } from './follow-up.js';
import type { NightState } from './night-state.js';
import { starDetail } from './star-detail.js';
import type { Conditions, NightView, ShortlistEntry, StarColumns, StarDetail } from './view.js';

/** Makes what the screens are sent: everything at once, or one star in detail. */
export class ViewMaker {
  private revision = 0;

  constructor(
    private readonly night: NightState,
    private readonly desk: FollowUpDesk,
  ) {}

  view(now_ms: number): NightView {
    const { night } = this;
    const { model } = night;
    return {
      revision: ++this.revision,
      time_ms: now_ms,
      field: night.profile.field.name,
      frames: night.frames,
      duplicates: night.duplicates,
      problems: night.problems,
      axes: model.axes,
      stars: this.columns(),
      shortlist: this.shortlist(now_ms),
      tracks: tracksInAxes(model.tracks, model.axes),
      letters: letterPositions(model.tracks, model.axes.colour),
      conditions: this.conditions(now_ms),
    };
  }

  detail(star: number, now_ms: number): StarDetail {
    return starDetail(this.night, this.desk, star, now_ms);
  }

  private columns(): StarColumns {
    const { catalogue, odds, inputs, model, flags } = this.night;
    const count = catalogue.count;
    const blue = inputs.bands.indexOf(model.axes.colour.blue);
    const red = inputs.bands.indexOf(model.axes.colour.red);
    const axis = inputs.bands.indexOf(model.axes.band);
    const bits = new Uint32Array(count);
    for (const [star, entry] of flags.flagged()) bits[star] = flagBits(entry.flags);
    const magnitudes = (band: number, star: number) => (band < 0 ? Number.NaN : inputs.mag[band][star]);
    return {
      count,
      ids: catalogue.ids.slice(),
      ra_deg: catalogue.ra_deg,
      dec_deg: catalogue.dec_deg,
      mag: Float32Array.from({ length: count }, (_, star) => magnitudes(axis, star)),
      colour: Float32Array.from(
        { length: count },
        (_, star) => magnitudes(blue, star) - magnitudes(red, star),
      ),
      absMag: odds.absMag.slice(0, count),
      absMagSigma: odds.absMagSigma.slice(0, count),
      classIndex: odds.classIndex.slice(0, count),
      classOdds: Float32Array.from(
        { length: count },
        (_, star) => odds.odds[star * CLASS_COUNT + odds.classIndex[star]],
      ),
      subtype: odds.subtype.slice(0, count),
      teff_K: odds.teff_K.slice(0, count),
      flagBits: bits,
      readings: catalogue.readings,
      lastFrame: catalogue.lastFrame,
    };
  }

  /** Flagged stars by merit; of equal ones the one that must be begun first. */
  private shortlist(now_ms: number): ShortlistEntry[] {
    const { catalogue, flags, odds } = this.night;
    const entries = flags.flagged().map(([star, entry]) => ({
      star,
      id: catalogue.ids[star],
      spectralType: spectralTypeText(odds.odds, star * CLASS_COUNT, odds.subtype[star], odds.teff_K[star]),
      ...entry,
      ...this.desk.of(star, now_ms),
    }));
    const startBy = (entry: ShortlistEntry) =>
      Number.isNaN(entry.window.startBy_ms) ? Number.POSITIVE_INFINITY : entry.window.startBy_ms;
    const rounded = (entry: ShortlistEntry) => Math.round(entry.merit * 10);
    return entries.sort((a, b) => rounded(b) - rounded(a) || startBy(a) - startBy(b) || a.star - b.star);
  }

  private conditions(now_ms: number): Conditions {
    const { ephemeris } = this.desk.sky;
    const { night } = this.desk.sky.at(now_ms);
    const timed = this.night.frames.filter(frame => !Number.isNaN(frame.mid_ms));
    const newest = timed.at(-1);
    const measured = this.desk.measured();
    return {
      seeing_arcsec: measured.seeing_arcsec(),
      seeingMeasured: measured.isSeeingMeasured,
      cloud_mag: measured.cloud_mag(),
      sky_magPerArcsec2: newest?.sky_magPerArcsec2 ?? Number.NaN,
      sunAltitude_deg: ephemeris.sunAltitude_deg(now_ms),
      moonAltitude_deg: ephemeris.moonAltitude_deg(now_ms),
      moonIllumination: ephemeris.moonIllumination(now_ms),
      darkFrom_ms: night.dark.dusk_ms,
      darkUntil_ms: night.dark.dawn_ms,
      darkWords: darkWords(night),
    };
  }
}
