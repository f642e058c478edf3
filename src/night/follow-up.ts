import { ExposureAdviser } from '../follow/exposure/suggest.js';
import type { Conditions as ExposureConditions, ExposureSuggestion } from '../follow/exposure/suggestion.js';
import type { TargetWindow } from '../follow/sky/window.js';
import { PosteriorReader } from '../science/odds/index.js';
import { zenithSeeing_arcsec } from '../science/photometry/seeing.js';
import { median } from '../science/statistics.js';
import type { NightState } from './night-state.js';
import { SkyNow } from './sky-now.js';
import type { FrameSummary } from './view.js';

/** Frames whose seeing counts as tonight's: the newest few. */
const RECENT_FRAMES = 4;

/** Exposures and window of one star at one time. */
export interface FollowUp {
  readonly exposures: readonly ExposureSuggestion[];
  readonly window: TargetWindow;
}

/** Works out what observing a star would take, with tonight's seeing. */
export class FollowUpDesk {
  readonly sky: SkyNow;
  private readonly adviser: ExposureAdviser;
  private reader: PosteriorReader | undefined;
  private readFor: unknown;

  constructor(private readonly night: NightState) {
    this.sky = new SkyNow(night.profile);
    this.adviser = new ExposureAdviser(night.profile);
  }

  of(star: number, now_ms: number): FollowUp {
    const { positions, profile } = this.night;
    const [ra, dec] = [positions.ra_deg[star], positions.dec_deg[star]];
    const sky = this.sky.at(now_ms);
    const tonight = sky.follow(ra, dec, now_ms);
    // A star that is not up yet is worked out for the airmass at which it may be begun.
    const up = tonight.spans.some(([from, until]) => from <= now_ms && now_ms < until);
    const exposures = this.adviser.suggest(this.posterior().predicted(star), {
      ...this.conditions(),
      airmass: up ? tonight.airmassNow : profile.site.maxAirmass,
    });
    const first = exposures.find(exposure => exposure.possible);
    return { exposures, window: sky.windowFor(tonight, first?.total_s ?? 0) };
  }

  /** Seeing at the zenith from the newest frames, the profile's until there are any. */
  seeing_arcsec(): number {
    const measured = this.night.frames
      .filter(frame => frame.fwhm_arcsec > 0)
      .slice(-RECENT_FRAMES)
      .map(frame =>
        zenithSeeing_arcsec(
          frame.fwhm_arcsec,
          Number.isNaN(frame.airmass) ? 1 : frame.airmass,
          this.wavelength_nm(frame),
        ),
      );
    return measured.length === 0 ? this.night.profile.site.seeing_arcsec : median(measured);
  }

  private conditions(): Omit<ExposureConditions, 'airmass'> {
    return {
      seeing_arcsec: this.seeing_arcsec(),
      siteHeight_m: this.night.profile.site.height_m,
      cloud_mag: 0,
    };
  }

  private wavelength_nm(frame: FrameSummary): number {
    const [band] = frame.bands;
    return (band === undefined ? undefined : this.adviser.passbands.get(band)?.wavelength_nm) ?? 550;
  }

  /** One reader per state of the stars: its buffers are large. */
  private posterior(): PosteriorReader {
    if (this.reader === undefined || this.readFor !== this.night.inputs) {
      this.readFor = this.night.inputs;
      this.reader = new PosteriorReader(this.night.model, this.night.inputs);
    }
    return this.reader;
  }
}
