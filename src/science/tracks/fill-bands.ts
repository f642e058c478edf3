import { applyTransform, findTransform, readTransforms } from '../transforms.js';
import { fillBand, magnitude } from './track.js';

/**
 * Fills the bands a table lacks by published transformations, inside their range; a band that cannot be
 * reached stays unknown. The relations are for ordinary stars: white dwarfs carry their own magnitudes.
 */
export function makeBandFiller(): (absMag: Float64Array) => void {
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

  return absMag => {
    const v = magnitude(absMag, 'V');
    const vIc = v - magnitude(absMag, 'Ic');
    fillBand(absMag, 'G', v + applyTransform(gV, vIc));
    fillBand(absMag, 'RP', v + applyTransform(rpV, vIc));
    fillBand(absMag, 'BP', v + applyTransform(bpV, vIc));
    fillBand(absMag, 'BP', magnitude(absMag, 'RP') + applyTransform(bpRp, vIc));

    fillBand(absMag, 'g', v + applyTransform(gFromBV, magnitude(absMag, 'B') - v));
    // V-g = c0 + c1 (g-r) solved for r.
    const [c0, c1] = vG.coefficients;
    fillBand(absMag, 'r', magnitude(absMag, 'g') - (v - magnitude(absMag, 'g') - c0) / c1);
    const gr = magnitude(absMag, 'g') - magnitude(absMag, 'r');
    fillBand(absMag, 'Rc', magnitude(absMag, 'r') + applyTransform(rcR, gr));
    // Ic-r = c0 + c1 (r-i) solved for i.
    const r = magnitude(absMag, 'r');
    fillBand(absMag, 'i', r - (magnitude(absMag, 'Ic') - r - icI.coefficients[0]) / icI.coefficients[1]);
    // U-B = c0 + c1 (u-g) solved for u.
    const ub = magnitude(absMag, 'U') - magnitude(absMag, 'B');
    fillBand(absMag, 'u', magnitude(absMag, 'g') + (ub - uB.coefficients[0]) / uB.coefficients[1]);

    const grP1 = panStarrsColour(
      gr,
      panStarrs[0].transform.coefficients,
      panStarrs[1].transform.coefficients,
    );
    for (const { band, target, transform } of panStarrs) {
      fillBand(absMag, target, magnitude(absMag, band) - applyTransform(transform, grP1));
    }
  };
}

/** gP1-rP1 of an SDSS g-r: the two Tonry relations subtracted and solved by fixed-point steps. */
function panStarrsColour(gr: number, g: readonly number[], r: readonly number[]): number {
  let x = gr;
  for (let step = 0; step < 6; step++) {
    x = gr - (g[0] - r[0]) - (g[1] - r[1]) * x - (g[2] - r[2]) * x * x;
  }
  return x;
}
