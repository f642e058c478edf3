import type { Problem } from '../catalogue/problems.js';
import type { StarCatalogue } from '../catalogue/stars.js';
import type { Profile } from '../follow/settings.js';
import type { ClassModel, OddsColumns, StarInputs } from '../science/odds/index.js';
import type { FlagBook } from './flag-book.js';
import type { FrameSummary } from './view.js';

/** What is known of the night at one moment; changed by the engine alone, read by everything that shows it. */
export interface NightState {
  readonly profile: Profile;
  readonly catalogue: StarCatalogue;
  readonly flags: FlagBook;
  readonly model: ClassModel;
  /** Means of all stars as the model reads them, made anew after each frame. */
  readonly inputs: StarInputs;
  /** Positions as they were when the inputs were read. */
  readonly positions: { readonly ra_deg: Float64Array; readonly dec_deg: Float64Array };
  readonly odds: OddsColumns;
  readonly problems: readonly Problem[];
  /** Files whose content had been read before. */
  readonly duplicates: number;
  /** In order of time; plain catalogues first. */
  readonly frames: readonly FrameSummary[];
}
