import type { ExposureSuggestion } from '../../follow/exposure/suggestion.js';
import type { TargetWindow } from '../../follow/sky/window.js';
import { oddsOf } from '../../night/evidence.js';
import type { FollowUpDesk } from '../../night/follow-up.js';
import type { NightState } from '../../night/night-state.js';
import { colourName } from '../../science/bands.js';
import { CLASSES } from '../../science/classes.js';
import { stellarRadius } from '../../science/luminosity.js';
import { temperatureTypeText } from '../../science/odds/index.js';

/** One star of `classify --format jsonl`: the keys and their order are a contract. null = not known. */
export interface StarRecord {
  readonly id: string;
  readonly ra_deg: number | null;
  readonly dec_deg: number | null;
  readonly mags: Readonly<
    Record<string, { readonly value: number; readonly sigma: number | null; readonly n: number }>
  >;
  readonly abs_mag: { readonly band: string; readonly value: number | null; readonly sigma: number | null };
  readonly colour: { readonly name: string; readonly value: number | null; readonly sigma: number | null };
  readonly spectral_type: string | null;
  readonly luminosity_class: string | null;
  readonly class: string | null;
  readonly odds: Readonly<Record<string, number | null>>;
  readonly teff_K: number | null;
  readonly teff_sigma_K: number | null;
  readonly distance_pc: number | null;
  readonly extinction_AV: number | null;
  readonly extinction_AV_sigma: number | null;
  readonly log_luminosity: number | null;
  readonly log_luminosity_sigma: number | null;
  readonly radius_Rsun: number | null;
  readonly radius_sigma_Rsun: number | null;
  readonly flags: readonly {
    readonly code: string;
    readonly odds: number | null;
    readonly because: string;
  }[];
  readonly cautions: readonly string[];
  /** Worked out for flagged stars only. */
  readonly exposures: readonly {
    readonly setup: string;
    readonly predicted_mag: number | null;
    readonly sigma_mag: number | null;
    readonly count: number;
    readonly each_s: number | null;
    readonly total_s: number | null;
    readonly snr: number | null;
    readonly limited_by: string;
  }[];
  readonly window: {
    readonly up_from: string | null;
    readonly start_by: string | null;
    readonly airmass_now: number | null;
  };
}

/** Writes the records of a night's stars, with the columns fetched once for all of them. */
export class RecordMaker {
  private readonly counts: readonly Float64Array[];
  private readonly blue: number;
  private readonly red: number;

  constructor(
    private readonly night: NightState,
    private readonly desk: FollowUpDesk,
    private readonly now_ms: number,
  ) {
    const { inputs, catalogue, model } = night;
    this.counts = inputs.bands.map(band => catalogue.readingsIn(band));
    this.blue = inputs.bands.indexOf(model.axes.colour.blue);
    this.red = inputs.bands.indexOf(model.axes.colour.red);
  }

  of(star: number): StarRecord {
    const { night } = this;
    const { catalogue, odds, model } = night;
    const entry = night.flags.of(star);
    const flagged = entry !== undefined && entry.flags.length > 0;
    const followUp = flagged ? this.desk.of(star, this.now_ms) : undefined;
    const known = odds.odds[star * CLASSES.length] >= 0;
    const starClass = CLASSES[odds.classIndex[star]];
    const type = known ? temperatureTypeText(starClass, odds.subtype[star], odds.teff_K[star]) : '';
    const { radius_Rsun, sigma_Rsun } = stellarRadius({
      logLuminosity: odds.logLuminosity[star],
      logLuminositySigma: odds.logLuminositySigma[star],
      teff_K: odds.teff_K[star],
      teffSigma_K: odds.teffSigma_K[star],
    });
    return {
      id: catalogue.ids[star],
      ra_deg: rounded(night.positions.ra_deg[star], 6),
      dec_deg: rounded(night.positions.dec_deg[star], 6),
      mags: this.magnitudes(star),
      abs_mag: {
        band: model.axes.band,
        value: rounded(odds.absMag[star], 3),
        sigma: rounded(odds.absMagSigma[star], 3),
      },
      colour: this.colour(star),
      spectral_type: type === '' ? null : type,
      luminosity_class: known ? starClass : null,
      class: known ? className(starClass) : null,
      odds: oddsOf(odds.odds, star, value => rounded(value, 4)),
      teff_K: rounded(odds.teff_K[star], 0),
      teff_sigma_K: rounded(odds.teffSigma_K[star], 0),
      distance_pc: rounded(10 ** ((odds.modulus_mag[star] + 5) / 5), 1),
      extinction_AV: rounded(odds.extinction_AV[star], 3),
      extinction_AV_sigma: rounded(odds.extinctionSigma_AV[star], 3),
      log_luminosity: rounded(odds.logLuminosity[star], 3),
      log_luminosity_sigma: rounded(odds.logLuminositySigma[star], 3),
      radius_Rsun: rounded(radius_Rsun, 4),
      radius_sigma_Rsun: rounded(sigma_Rsun, 4),
      flags: (entry?.flags ?? []).map(flag => ({ ...flag, odds: rounded(flag.odds, 4) })),
      cautions: entry?.cautions ?? [],
      exposures: (followUp?.exposures ?? []).map(exposureRecord),
      window: windowRecord(followUp?.window),
    };
  }

  private magnitudes(star: number): StarRecord['mags'] {
    const { bands, mag, sigma_mag } = this.night.inputs;
    const named: Record<string, { value: number; sigma: number | null; n: number }> = {};
    bands.forEach((band, b) => {
      const value = rounded(mag[b][star], 4);
      if (value !== null)
        named[band] = { value, sigma: rounded(sigma_mag[b][star], 4), n: this.counts[b][star] };
    });
    return named;
  }

  private colour(star: number): StarRecord['colour'] {
    const { inputs, model } = this.night;
    const name = colourName(model.axes.colour);
    if (this.blue < 0 || this.red < 0) return { name, value: null, sigma: null };
    return {
      name,
      value: rounded(inputs.mag[this.blue][star] - inputs.mag[this.red][star], 4),
      sigma: rounded(Math.hypot(inputs.sigma_mag[this.blue][star], inputs.sigma_mag[this.red][star]), 4),
    };
  }
}

/** In words, for those who do not think in Roman numerals. */
function className(starClass: (typeof CLASSES)[number]): string {
  const names: Record<(typeof CLASSES)[number], string> = {
    V: 'dwarf',
    IV: 'subgiant',
    III: 'giant',
    II: 'bright giant',
    Ib: 'supergiant',
    Iab: 'supergiant',
    Ia: 'supergiant',
    WD: 'white dwarf',
    sd: 'subdwarf',
    sdOB: 'hot subdwarf',
    none: 'none',
  };
  return names[starClass];
}

function exposureRecord(exposure: ExposureSuggestion): StarRecord['exposures'][number] {
  return {
    setup: exposure.setup,
    predicted_mag: rounded(exposure.predicted_mag, 3),
    sigma_mag: rounded(exposure.predictedSigma_mag, 3),
    count: exposure.count,
    each_s: rounded(exposure.each_s, 1),
    total_s: rounded(exposure.total_s, 1),
    snr: rounded(exposure.snr, 1),
    limited_by: exposure.limitedBy,
  };
}

function windowRecord(window: TargetWindow | undefined): StarRecord['window'] {
  return {
    up_from: isoTime(window?.upFrom_ms),
    start_by: isoTime(window?.startBy_ms),
    airmass_now: rounded(window?.airmassNow ?? Number.NaN, 3),
  };
}

function isoTime(time_ms: number | undefined): string | null {
  if (time_ms === undefined || Number.isNaN(time_ms)) return null;
  return new Date(Math.round(time_ms / 1000) * 1000).toISOString().replace('.000Z', 'Z');
}

const POWERS = [1, 10, 100, 1e3, 1e4, 1e5, 1e6];

/** A number with so many decimals (up to six); null for what is not known. */
export function rounded(value: number, decimals: number): number | null {
  if (!Number.isFinite(value)) return null;
  const scale = POWERS[decimals];
  return Math.round(value * scale) / scale;
}
