import type { Profile } from '../follow/settings.js';
import { type SkyGeometry, skyBrightness_magPerArcsec2 } from '../follow/sky/sky-light.js';
import type { Band } from '../science/bands.js';
import type { Passband } from '../science/passbands.js';
import { zenithSeeing_arcsec } from '../science/photometry/seeing.js';
import { median, quantile } from '../science/statistics.js';
import type { FrameSummary } from './view.js';

/** Frames that count as "now": the newest few, none older than an hour before the newest. */
const RECENT_FRAMES = 4;
const RECENT_MS = 3_600_000;
/** The best of the night is the 90 % point of its zero points: one frame too good does not set it. */
const BEST = 0.9;
/** Less than this is the scatter of zero points, not cloud. */
const LEAST_CLOUD_MAG = 0.05;

/** Tonight's sky as the frames show it: each value is the profile's where nothing was measured. */
export class MeasuredConditions {
  private readonly recent: readonly FrameSummary[];

  constructor(
    private readonly frames: readonly FrameSummary[],
    private readonly profile: Profile,
    private readonly passbands: ReadonlyMap<Band, Passband>,
  ) {
    const timed = frames.filter(frame => !Number.isNaN(frame.mid_ms));
    const newest = timed.at(-1)?.mid_ms ?? Number.NaN;
    this.recent = timed.filter(frame => newest - frame.mid_ms < RECENT_MS).slice(-RECENT_FRAMES);
  }

  /** Seeing at the zenith and 500 nm. */
  seeing_arcsec(): number {
    const measured = this.recent
      .filter(frame => frame.fwhm_arcsec > 0)
      .map(frame => zenithSeeing_arcsec(frame.fwhm_arcsec, airmassOf(frame), this.wavelength_nm(frame)));
    return measured.length === 0 ? this.profile.site.seeing_arcsec : median(measured);
  }

  get isSeeingMeasured(): boolean {
    return this.recent.some(frame => frame.fwhm_arcsec > 0);
  }

  /**
   * Transparency lost against the best of the night, magnitudes: zero points freed of the extinction at their airmass,
   * band by band. 0 where no frame tells a zero point, or where the loss is within the scatter.
   */
  cloud_mag(): number {
    const losses = this.recent
      .map(frame => this.best(frame.bands[0]) - this.clear(frame))
      .filter(loss => !Number.isNaN(loss));
    if (losses.length === 0) return 0;
    const loss = median(losses.slice(-2));
    return loss < LEAST_CLOUD_MAG ? 0 : loss;
  }

  /** How much fainter than the model the measured sky of a band is; 0 where it was not measured. */
  skyOffset_mag(band: Band, geometryAt: (time_ms: number) => SkyGeometry): number {
    const settings = this.profile.bands.find(entry => entry.band === band);
    const passband = this.passbands.get(band);
    const measured = this.recent.filter(
      frame => frame.bands[0] === band && !Number.isNaN(frame.sky_magPerArcsec2),
    );
    if (settings === undefined || passband === undefined || measured.length === 0) return 0;
    const bandV = this.profile.bands.find(entry => entry.band === 'V');
    const offsets = measured.map(
      frame =>
        frame.sky_magPerArcsec2 -
        skyBrightness_magPerArcsec2(geometryAt(frame.mid_ms), settings, passband.wavelength_nm, bandV),
    );
    const known = offsets.filter(offset => !Number.isNaN(offset));
    return known.length === 0 ? 0 : median(known);
  }

  /** Zero point as it would be above the atmosphere. */
  private clear(frame: FrameSummary): number {
    const settings = this.profile.bands.find(entry => entry.band === frame.bands[0]);
    return frame.zeroPoint_mag + (settings?.extinction_magPerAirmass ?? 0) * airmassOf(frame);
  }

  private best(band: Band | undefined): number {
    const zeroPoints = this.frames
      .filter(frame => frame.bands[0] === band)
      .map(frame => this.clear(frame))
      .filter(zeroPoint => !Number.isNaN(zeroPoint));
    return zeroPoints.length === 0 ? Number.NaN : quantile(zeroPoints, BEST);
  }

  private wavelength_nm(frame: FrameSummary): number {
    const [band] = frame.bands;
    return (band === undefined ? undefined : this.passbands.get(band)?.wavelength_nm) ?? 550;
  }
}

/** A frame that does not tell its airmass is taken at the zenith. */
function airmassOf(frame: FrameSummary): number {
  return Number.isNaN(frame.airmass) ? 1 : frame.airmass;
}
