import { ExposureAdviser } from '../follow/exposure/suggest.js';
import type { Conditions, ExposureSuggestion } from '../follow/exposure/suggestion.js';
import { skyBrightness_magPerArcsec2 } from '../follow/sky/sky-light.js';
import type { StarTonight, TargetWindow } from '../follow/sky/window.js';
import type { Band } from '../science/bands.js';
import { type ClassEvidence, PosteriorReader } from '../science/odds/index.js';
import { airmass } from '../science/sky/airmass.js';
import { MeasuredConditions } from './measured-conditions.js';
import type { NightState } from './night-state.js';
import { SkyNow } from './sky-now.js';

/** Exposures and window of one star at one time. */
export interface FollowUp {
  readonly exposures: readonly ExposureSuggestion[];
  readonly window: TargetWindow;
}

/** What was worked out for one state of the stars, and serves until the next frame. */
interface Desk {
  readonly inputs: unknown;
  readonly reader: PosteriorReader;
  readonly measured: MeasuredConditions;
  readonly skyOffsets: Map<Band, number>;
}

/** Works out what observing a star would take, under tonight's measured seeing, transparency and sky. */
export class FollowUpDesk {
  readonly sky: SkyNow;
  private readonly adviser: ExposureAdviser;
  private desk: Desk | undefined;

  constructor(private readonly night: NightState) {
    this.sky = new SkyNow(night.profile);
    this.adviser = new ExposureAdviser(night.profile);
  }

  of(star: number, now_ms: number): FollowUp {
    const { positions } = this.night;
    const sky = this.sky.at(now_ms);
    const tonight = sky.follow(positions.ra_deg[star], positions.dec_deg[star], now_ms);
    const conditions = this.conditionsFor(star, tonight);
    const exposures = this.adviser.suggest(this.current().reader.predicted(star), conditions);
    const first = exposures.find(exposure => exposure.possible);
    return { exposures, window: sky.windowFor(tonight, first?.total_s ?? 0) };
  }

  /** What each class would have the star be. */
  evidenceOf(star: number): readonly ClassEvidence[] {
    return this.current().reader.evidence(star);
  }

  /** Tonight's seeing, cloud and sky from the frames. */
  measured(): MeasuredConditions {
    return this.current().measured;
  }

  /** A star that is not up yet is worked out for the time and airmass at which it may be begun. */
  private conditionsFor(star: number, tonight: StarTonight): Conditions {
    const { positions, profile } = this.night;
    const { now_ms, spans } = tonight;
    const next = spans.find(([, until]) => now_ms < until);
    const isUp = next !== undefined && next[0] <= now_ms;
    const when_ms = next === undefined || isUp ? now_ms : next[0];
    const place = [positions.ra_deg[star], positions.dec_deg[star], when_ms] as const;
    const sky = this.sky.at(now_ms);
    const geometry = sky.geometryAt(...place);
    const airmassLater =
      next === undefined ? profile.site.maxAirmass : airmass(90 - geometry.targetZenithDistance_deg);
    const bandV = profile.bands.find(entry => entry.band === 'V');
    const { measured } = this.current();
    return {
      airmass: isUp ? tonight.airmassNow : airmassLater,
      parallacticAngle_deg: sky.parallacticAngle_deg(...place),
      seeing_arcsec: measured.seeing_arcsec(),
      siteHeight_m: profile.site.height_m,
      cloud_mag: measured.cloud_mag(),
      sky_magPerArcsec2: (band, wavelength_nm) =>
        skyBrightness_magPerArcsec2(geometry, band, wavelength_nm, bandV) + this.skyOffset(band.band),
    };
  }

  private skyOffset(band: Band): number {
    const { measured, skyOffsets } = this.current();
    let offset = skyOffsets.get(band);
    if (offset === undefined) {
      // Any star of the field will do: the sky is the same over it.
      const { ra_deg, dec_deg } = this.night.positions;
      offset = measured.skyOffset_mag(band, time_ms =>
        this.sky.at(time_ms).geometryAt(ra_deg[0], dec_deg[0], time_ms),
      );
      skyOffsets.set(band, offset);
    }
    return offset;
  }

  private current(): Desk {
    const { model, inputs, frames, profile } = this.night;
    if (this.desk?.inputs !== inputs) {
      this.desk = {
        inputs,
        reader: new PosteriorReader(model, inputs),
        measured: new MeasuredConditions(frames, profile, this.adviser.passbands),
        skyOffsets: new Map(),
      };
    }
    return this.desk;
  }
}
