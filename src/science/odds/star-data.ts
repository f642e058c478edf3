import { BAND_INDEX, type Band } from '../bands.js';
import { isGoodParallax } from './distance-term.js';
import { floorOf } from './field.js';
import type { ClassModel } from './model.js';
import type { StarInputs } from './star-inputs.js';

/** Ratio of A_V to true E(B-V) of the mean law (common practice). */
const R_V = 3.1;
/** A star's own E(B-V) is trusted to 10 %, never better than 0.05 mag of A_V. */
const STAR_AV_ERROR = 0.1;
const STAR_AV_FLOOR = 0.05;

/** One star's numbers as the fit uses them: usable magnitudes, their weights, parallax, prior on A_V. */
export class StarData {
  /** Number of usable magnitudes; the arrays by slot hold so many. */
  used = 0;
  readonly mags: Float64Array;
  /** The nodes' absolute magnitudes and A_band / A_V in the band of each slot. */
  readonly nodeMags: Float64Array[];
  readonly nodeRatios: Float64Array[];
  /** Slot of the band of the axes, else the first. */
  referenceSlot = 0;
  /** Slots of the two bands of the axes' colour, -1 where one is missing. */
  blueSlot = -1;
  redSlot = -1;
  /** 1 / variance by noise group and slot (element group * stride + slot), and the product over the slots. */
  readonly weights: Float64Array;
  readonly weightProduct: Float64Array;
  readonly stride: number;
  /** True where the prior on A_V is to be looked up node by node, by the distance the node needs. */
  extinctionByNode = false;
  priorAV = 0;
  priorAVVariance = 0;
  parallax_mas = Number.NaN;
  parallaxSigma_mas = Number.NaN;
  pmRa_masPerYear = Number.NaN;
  pmDec_masPerYear = Number.NaN;
  private readonly floors2: Float64Array;
  private readonly bandIndices: readonly number[];

  constructor(
    private readonly model: ClassModel,
    private readonly inputs: StarInputs,
  ) {
    this.stride = inputs.bands.length;
    this.mags = new Float64Array(this.stride);
    this.nodeMags = inputs.bands.map(band => model.absMag[BAND_INDEX[band]]);
    this.nodeRatios = inputs.bands.map(band => model.extinctionRatio[BAND_INDEX[band]]);
    this.weights = new Float64Array(model.groups.length * this.stride);
    this.weightProduct = new Float64Array(model.groups.length);
    this.floors2 = Float64Array.from(inputs.bands, band => floorOf(model.field, band) ** 2);
    this.bandIndices = inputs.bands.map(band => BAND_INDEX[band]);
  }

  /** Takes star i of the inputs. */
  take(i: number): void {
    this.takeMagnitudes(i);
    this.parallax_mas = this.inputs.parallax_mas[i] - this.model.field.parallaxZeroPoint_mas;
    this.parallaxSigma_mas = this.inputs.parallaxSigma_mas[i];
    this.pmRa_masPerYear = this.inputs.pmRa_masPerYear[i];
    this.pmDec_masPerYear = this.inputs.pmDec_masPerYear[i];
    this.takeExtinction(i);
  }

  get hasParallax(): boolean {
    return this.parallaxSigma_mas > 0 && !Number.isNaN(this.parallax_mas);
  }

  /** Variance of the common offset of all bands, in the noise group with the least scatter. */
  offsetVariance_mag2(): number {
    let weight = 0;
    for (let slot = 0; slot < this.used; slot++) weight += this.weights[slot];
    return 1 / weight;
  }

  private takeMagnitudes(i: number): void {
    const { bands, mag, sigma_mag } = this.inputs;
    const { groups, axes } = this.model;
    this.used = 0;
    this.referenceSlot = 0;
    this.blueSlot = -1;
    this.redSlot = -1;
    this.weightProduct.fill(1);
    for (let b = 0; b < this.stride; b++) {
      const m = mag[b][i];
      const sigma = sigma_mag[b][i];
      if (!(m > -30 && m < 40) || !(sigma >= 0)) continue;
      const slot = this.used++;
      const index = this.bandIndices[b];
      this.nodeMags[slot] = this.model.absMag[index];
      this.nodeRatios[slot] = this.model.extinctionRatio[index];
      this.mags[slot] = m;
      this.noteSlot(bands[b], slot, axes);
      const variance = sigma * sigma + this.floors2[b];
      for (let g = 0; g < groups.length; g++) {
        const weight = 1 / (variance + groups[g].bandVariance_mag2[index]);
        this.weights[g * this.stride + slot] = weight;
        this.weightProduct[g] *= weight;
      }
    }
  }

  private noteSlot(band: Band, slot: number, axes: ClassModel['axes']): void {
    if (band === axes.band) this.referenceSlot = slot;
    if (band === axes.colour.blue) this.blueSlot = slot;
    if (band === axes.colour.red) this.redSlot = slot;
  }

  /** Its own E(B-V) where the table has one; else the field's, at the star's distance where that is well known. */
  private takeExtinction(i: number): void {
    const { extinction } = this.model;
    const reddening = this.inputs.reddening_EBV[i];
    const hasOwn = !Number.isNaN(reddening);
    const hasGoodParallax = isGoodParallax(this.parallax_mas, this.parallaxSigma_mas);
    this.extinctionByNode = !hasOwn && extinction.growsWithDistance && !hasGoodParallax;
    if (hasOwn) {
      this.priorAV = R_V * Math.max(0, reddening);
      this.priorAVVariance = Math.max(STAR_AV_FLOOR, STAR_AV_ERROR * this.priorAV) ** 2;
      return;
    }
    const modulus_mag = 10 - 5 * Math.log10(this.parallax_mas);
    this.priorAV = this.extinctionByNode ? extinction.most_AV : extinction.atModulus(modulus_mag);
    this.priorAVVariance = extinction.variance(this.priorAV);
  }
}
