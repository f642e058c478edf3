import type { FrameReadings } from '../catalogue/frame.js';
import type { Problem } from '../catalogue/problems.js';
import { readFrame } from '../catalogue/read-frame.js';
import { StarCatalogue } from '../catalogue/stars.js';
import type { Profile } from '../follow/settings.js';
import {
  buildModel,
  type ClassModel,
  classifySome,
  growOddsColumns,
  makeOddsColumns,
  type OddsColumns,
  type StarInputs,
} from '../science/odds/index.js';
import { chooseAxes } from './axes.js';
import { ChangeSearch } from './change-search.js';
import { classifyParallel } from './classify-parallel.js';
import { EvidenceMaker } from './evidence.js';
import { FlagBook } from './flag-book.js';
import { FrameLog } from './frame-log.js';
import type { NightState } from './night-state.js';
import { ProblemBook } from './problem-book.js';
import type { FrameSummary } from './view.js';

/** One file as it comes. */
export interface NightFile {
  /** Its name without folders. */
  readonly name: string;
  readonly bytes: Uint8Array;
  /** Tells it from files of the same name in other folders. */
  readonly place: string;
}

/** What happened to one file: `known` has the content of another, `unchanged` the content it had before. */
export interface FileOutcome {
  readonly name: string;
  readonly kind: 'read' | 'replaced' | 'known' | 'unchanged' | 'refused';
  /** Index of the frame; -1 where there is none. */
  readonly frame: number;
  readonly problems: readonly Problem[];
}

/**
 * One night's state: every file read so far, the stars they merge into, what each star is, and which are
 * unusual. Knows neither disk nor clock; the worker and `classify` feed it.
 */
export class NightEngine implements NightState {
  readonly catalogue: StarCatalogue;
  readonly flags: FlagBook;
  model: ClassModel;
  inputs: StarInputs;
  positions: NightState['positions'];
  odds: OddsColumns = makeOddsColumns(1024);
  duplicates = 0;
  private readonly book = new ProblemBook();
  private readonly summaries = new Map<number, FrameSummary>();
  private readonly log = new FrameLog();
  private readonly changes = new ChangeSearch();
  private capacity = 1024;
  /** Bands the model was built for. */
  private modelBands = '';

  constructor(readonly profile: Profile) {
    this.catalogue = new StarCatalogue(profile.input.matchRadius_arcsec);
    this.flags = new FlagBook(profile.flags);
    this.model = this.modelFor();
    this.inputs = this.readInputs();
    this.positions = this.readPositions();
  }

  get frames(): readonly FrameSummary[] {
    return [...this.summaries.values()].sort(
      (a, b) =>
        (Number.isNaN(a.mid_ms) ? 0 : a.mid_ms) - (Number.isNaN(b.mid_ms) ? 0 : b.mid_ms) ||
        a.index - b.index,
    );
  }

  get problems(): readonly Problem[] {
    return this.book.all();
  }

  /** Reads one file of the night's folder and lets everything that depends on it follow. */
  async absorb(name: string, bytes: Uint8Array): Promise<FileOutcome> {
    const taken = await this.take({ name, bytes, place: name });
    if (taken.frame >= 0) this.follow(taken.frame, taken.stars);
    return taken;
  }

  /** Reads many files, one at a time, and follows once at the end, on two threads: for a night that is already over. */
  async absorbAll(files: AsyncIterable<NightFile>): Promise<readonly FileOutcome[]> {
    const outcomes: FileOutcome[] = [];
    let last = -1;
    for await (const file of files) {
      const { stars: _, ...outcome } = await this.take(file);
      if (outcome.frame >= 0) last = outcome.frame;
      outcomes.push(outcome);
    }
    if (last < 0) return outcomes;
    this.readStars();
    await classifyParallel(this.model, this.inputs, this.odds);
    this.judge(everyStar(this.catalogue.count), last);
    return outcomes;
  }

  /** Takes the first frame of a night that no file holds, as a rehearsal makes it. */
  absorbReadings(readings: FrameReadings): void {
    this.follow(0, this.catalogue.absorb(readings, 0));
  }

  /** A file of the night's folder that could not even be opened. */
  refuse(name: string, problem: Problem): void {
    this.book.set(name, [problem]);
  }

  private async take({
    name,
    bytes,
    place,
  }: NightFile): Promise<FileOutcome & { readonly stars: Uint32Array }> {
    const { content, frame, problems } = await readFrame(name, bytes, this.profile.input);
    if (frame === undefined) {
      // An earlier frame under this name stays: it was good.
      this.book.set(place, problems);
      return { name, kind: 'refused', frame: -1, problems, stars: NO_STARS };
    }
    const fate = this.log.decide(place, content);
    if (fate.kind === 'known') return { name, kind: 'known', ...this.repeated(place, fate.freed) };
    this.book.set(place, problems);
    if (fate.kind === 'unchanged') return { name, kind: 'unchanged', frame: -1, problems, stars: NO_STARS };
    const stars = this.catalogue.absorb(frame, fate.index);
    const { facts } = frame;
    this.summaries.set(fate.index, {
      index: fate.index,
      name: facts.name,
      mid_ms: facts.mid_ms,
      bands: frame.bands.map(({ band }) => band),
      rows: frame.rows,
      fwhm_arcsec: facts.fwhm_arcsec,
      airmass: facts.airmass,
      zeroPoint_mag: facts.zeroPoint_mag,
      sky_magPerArcsec2: facts.sky_magPerArcsec2,
    });
    const replaced = fate.kind === 'replacement';
    return {
      name,
      kind: replaced ? 'replaced' : 'read',
      frame: fate.index,
      problems,
      // A replaced frame may have lost stars: all of them are looked at again.
      stars: replaced ? everyStar(this.catalogue.count) : stars,
    };
  }

  /** Content of another file, which has told its problems; the frame that this file had before is gone. */
  private repeated(place: string, freed: number | undefined) {
    this.duplicates++;
    this.book.set(place, []);
    if (freed === undefined) return { frame: -1, problems: [], stars: NO_STARS };
    this.catalogue.forget(freed);
    this.summaries.delete(freed);
    return { frame: freed, problems: [], stars: everyStar(this.catalogue.count) };
  }

  /** Classifies and judges the stars that a frame touched. */
  private follow(frame: number, touched: Uint32Array): void {
    const sameBands = this.readStars();
    const stars = sameBands ? touched : everyStar(this.catalogue.count);
    classifySome(this.model, this.inputs, stars, this.odds);
    this.judge(stars, frame);
  }

  /** Takes the stars' means over from the catalogue; false when their bands need another model. */
  private readStars(): boolean {
    this.ensureRoom();
    this.inputs = this.readInputs();
    this.positions = this.readPositions();
    const sameBands = this.catalogue.bands.join() === this.modelBands;
    if (!sameBands) this.model = this.modelFor();
    return sameBands;
  }

  private judge(stars: Uint32Array, frame: number): void {
    this.changes.search(this.catalogue, stars);
    const evidence = new EvidenceMaker(this, this.changes);
    for (const star of stars) this.flags.judge(star, evidence.of(star), frame);
  }

  private modelFor(): ClassModel {
    const { bands } = this.catalogue;
    const axes = chooseAxes(
      bands,
      this.profile.bands.map(({ band }) => band),
    );
    this.modelBands = bands.join();
    return buildModel(this.profile.field, axes, bands);
  }

  private readInputs(): StarInputs {
    const { catalogue } = this;
    const bands = catalogue.bands;
    return {
      count: catalogue.count,
      bands,
      mag: bands.map(band => catalogue.mag(band)),
      sigma_mag: bands.map(band => catalogue.sigma(band)),
      parallax_mas: catalogue.parallax_mas,
      parallaxSigma_mas: catalogue.parallax_sigma_mas,
      pmRa_masPerYear: catalogue.pmRa_masPerYear,
      pmDec_masPerYear: catalogue.pmDec_masPerYear,
      reddening_EBV: catalogue.reddening_EBV,
    };
  }

  private readPositions() {
    return { ra_deg: this.catalogue.ra_deg, dec_deg: this.catalogue.dec_deg };
  }

  private ensureRoom(): void {
    if (this.catalogue.count <= this.capacity) return;
    this.capacity = Math.ceil(this.catalogue.count * 1.5);
    this.odds = growOddsColumns(this.odds, this.capacity);
  }
}

const NO_STARS = new Uint32Array(0);

function everyStar(count: number): Uint32Array {
  return Uint32Array.from({ length: count }, (_, star) => star);
}
