import { scoreBrightStars } from '../support/luminosity-groups.js';
import { BV_AXES, GAIA_AXES, OPEN_FIELD } from '../support/star-inputs.js';
import { calibrate, drawField } from '../support/synthetic-field.js';

/** Prints how far the odds can be trusted on made-up fields: npm run bench:odds. */
const PRIOR = {
  ...OPEN_FIELD,
  extinction_AV: 0.15,
  extinctionSigma_AV: 0.06,
  // Rare classes made common, in the draw and in the prior alike: only so can their odds be judged.
  classScale: { IV: 3, III: 3, II: 300, Ib: 1000, Iab: 1000, Ia: 1000, WD: 300, sd: 20, sdOB: 3000 },
};

const FIELDS = [
  {
    name: 'B V, parallax ± 0.04 mas',
    bands: ['B', 'V'],
    selectedBy: 'V',
    axes: BV_AXES,
    parallaxSigma_mas: 0.04,
  },
  {
    name: 'B V, parallax ± 0.4 mas',
    bands: ['B', 'V'],
    selectedBy: 'V',
    axes: BV_AXES,
    parallaxSigma_mas: 0.4,
  },
  {
    name: 'Gaia bands, parallax ± 0.06 mas',
    bands: ['G', 'BP', 'RP'],
    selectedBy: 'G',
    axes: GAIA_AXES,
    parallaxSigma_mas: 0.06,
  },
  {
    name: 'B V Ic G BP RP, ± 0.06 mas',
    bands: ['B', 'V', 'Ic', 'G', 'BP', 'RP'],
    selectedBy: 'V',
    axes: BV_AXES,
    parallaxSigma_mas: 0.06,
  },
] as const;

for (const { name, axes, ...plan } of FIELDS) {
  const field = drawField(
    { ...plan, stars: 20_000, brightest: 8, faintest: 15, sigma_mag: 0.015, seed: 41 },
    PRIOR,
  );
  const { accuracy, brier, expectedError, bins, byClass } = calibrate(field, PRIOR, axes);
  console.log(
    `${name}: right ${(100 * accuracy).toFixed(1)} %, Brier score ${brier.toFixed(3)}, expected calibration error ${expectedError.toFixed(4)}`,
  );
  console.log('  stated  found  number');
  for (const bin of bins) {
    console.log(
      `  ${bin.stated.toFixed(2).padStart(6)} ${bin.found.toFixed(2).padStart(6)} ${String(bin.count).padStart(7)}`,
    );
  }
  const classes = byClass.filter(({ stars }) => stars > 0);
  console.log(
    `  right by class: ${classes.map(({ name: c, right, stars }) => `${c} ${right}/${stars}`).join(', ')}\n`,
  );
}

const bright = scoreBrightStars();
console.log(
  `real bright stars, B V and parallax: right luminosity group ${bright.right} of ${bright.stars} (${((100 * bright.right) / bright.stars).toFixed(0)} %), stated ${(100 * bright.stated).toFixed(0)} %`,
);
console.log(
  `  right by group: ${[...bright.byGroup].map(([group, { stars, right }]) => `${group} ${right}/${stars}`).join(', ')}`,
);
