import { BAND_INDEX, type Band } from '../bands.js';
import { applyTransform, findTransform, readTransforms, type Transform } from '../transforms.js';
import { type FillMissing, fillBand, magnitude } from './track.js';

/** Scatter of relations whose authors state none: they agree with others to 0.03-0.05 mag (head of transforms.csv). */
const UNSTATED_SIGMA_MAG = 0.04;

/**
 * Fills the bands a table lacks by published transformations, inside their range; a band that cannot be
 * reached stays unknown. The relations are for ordinary stars: white dwarfs carry their own magnitudes.
 */
export function makeBandFiller(): FillMissing {
  const transforms = readTransforms();
  const gV = findTransform(transforms, 'G-V', 'V-Ic', 'Riello');
  const bpV = findTransform(transforms, 'BP-V', 'V-Ic', 'Riello');
  const rpV = findTransform(transforms, 'RP-V', 'V-Ic', 'Riello');
  const bpRp = findTransform(transforms, 'BP-RP', 'V-Ic', 'Riello');
  const vG = findTransform(transforms, 'V-g', 'g-r', 'Lupton');
  const rcR = findTransform(transforms, 'Rc-r', 'g-r', 'Lupton');
  const icI = findTransform(transforms, 'Ic-r', 'r-i', 'Lupton');
  const gFromBV = findTransform(transforms, 'g-V', 'B-V', 'Jordi');
  const uB = findTransform(transforms, 'U-B', 'u-g', 'Jordi');
  const panStarrs = (['g', 'r', 'i', 'z'] as const).map(band => ({
    band,
    target: `${band}P1` as const,
    transform: findTransform(transforms, `${band}-${band}P1`, 'gP1-rP1', 'Tonry'),
  }));

  return (absMag, fillSigma_mag) => {
    const fill = (band: Band, value: number, ...by: readonly Transform[]) => {
      if (!Number.isNaN(magnitude(absMag, band)) || Number.isNaN(value)) return;
      fillBand(absMag, band, value);
      const index = BAND_INDEX[band];
      fillSigma_mag[index] = Math.max(fillSigma_mag[index], Math.hypot(...by.map(scatterOf)));
    };
    const v = magnitude(absMag, 'V');
    const vIc = v - magnitude(absMag, 'Ic');
    fill('G', v + applyTransform(gV, vIc), gV);
    fill('RP', v + applyTransform(rpV, vIc), rpV);
    fill('BP', v + applyTransform(bpV, vIc), bpV);
    fill('BP', magnitude(absMag, 'RP') + applyTransform(bpRp, vIc), bpRp);

    fill('g', v + applyTransform(gFromBV, magnitude(absMag, 'B') - v), gFromBV);
    // V-g = c0 + c1 (g-r) solved for r.
    const [c0, c1] = vG.coefficients;
    fill('r', magnitude(absMag, 'g') - (v - magnitude(absMag, 'g') - c0) / c1, gFromBV, vG);
    const gr = magnitude(absMag, 'g') - magnitude(absMag, 'r');
    fill('Rc', magnitude(absMag, 'r') + applyTransform(rcR, gr), rcR);
    // Ic-r = c0 + c1 (r-i) solved for i.
    const r = magnitude(absMag, 'r');
    fill('i', r - (magnitude(absMag, 'Ic') - r - icI.coefficients[0]) / icI.coefficients[1], icI);
    // U-B = c0 + c1 (u-g) solved for u.
    const ub = magnitude(absMag, 'U') - magnitude(absMag, 'B');
    fill('u', magnitude(absMag, 'g') + (ub - uB.coefficients[0]) / uB.coefficients[1], uB);

    const grP1 = panStarrsColour(
      gr,
      panStarrs[0].transform.coefficients,
      panStarrs[1].transform.coefficients,
    );
    for (const { band, target, transform } of panStarrs) {
      fill(target, magnitude(absMag, band) - applyTransform(transform, grP1), transform);
    }
  };
}

function scatterOf({ sigma_mag }: Transform): number {
  return Number.isNaN(sigma_mag) ? UNSTATED_SIGMA_MAG : sigma_mag;
}

/** gP1-rP1 of an SDSS g-r: the two Tonry relations subtracted and solved by fixed-point steps. */
function panStarrsColour(gr: number, g: readonly number[], r: readonly number[]): number {
  let x = gr;
  for (let step = 0; step < 6; step++) {
    x = gr - (g[0] - r[0]) - (g[1] - r[1]) * x - (g[2] - r[2]) * x * x;
  }
  return x;
}
