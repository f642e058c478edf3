/**
 * Quantile by linear interpolation between the order statistics (type 7 of Hyndman & Fan 1996, Am. Stat. 50,
 * 361). NaN of nothing; the values must be finite.
 */
export function quantile(values: ArrayLike<number>, share: number): number {
  const sorted = Float64Array.from(values).sort();
  const place = share * (sorted.length - 1);
  const below = Math.floor(place);
  if (sorted.length === 0) return Number.NaN;
  const above = Math.min(below + 1, sorted.length - 1);
  return sorted[below] + (place - below) * (sorted[above] - sorted[below]);
}

export function median(values: ArrayLike<number>): number {
  return quantile(values, 0.5);
}

/** 1.4826 times the median absolute deviation: sigma of a Gaussian, blind to outliers; 0 when half are equal. */
export function sigmaFromMad(values: ArrayLike<number>): number {
  const centre = median(values);
  return 1.4826 * median(Float64Array.from(values, value => Math.abs(value - centre)));
}

const LANCZOS = [
  0.99999999999980993, 676.5203681218851, -1259.1392167224028, 771.32342877765313, -176.61502916214059,
  12.507343278686905, -0.13857109526572012, 9.9843695780195716e-6, 1.5056327351493116e-7,
];

/** ln of the gamma function for x > 0 (Lanczos 1964, SIAM J. Numer. Anal. 1, 86; g = 7, 9 terms): 1e-14. */
export function logGamma(x: number): number {
  if (x < 0.5) return Math.log(Math.PI / Math.sin(Math.PI * x)) - logGamma(1 - x);
  const t = x + 6.5;
  let sum = LANCZOS[0];
  for (let i = 1; i < LANCZOS.length; i++) sum += LANCZOS[i] / (x - 1 + i);
  return 0.5 * Math.log(2 * Math.PI) + (x - 0.5) * Math.log(t) - t + Math.log(sum);
}

const MOST_TERMS = 10_000;

/**
 * Upper regularised incomplete gamma function Q(a, x), a > 0, x >= 0 (Abramowitz & Stegun 1964, 6.5.29 and
 * 6.5.31): series below x = a + 1, continued fraction above, where tails down to 1e-300 keep their digits.
 */
export function gammaQ(a: number, x: number): number {
  if (!(x >= 0) || !(a > 0)) return Number.NaN;
  if (x === 0) return 1;
  const front = Math.exp(a * Math.log(x) - x - logGamma(a));
  if (x < a + 1) {
    let term = 1 / a;
    let sum = term;
    for (let n = 1; n < MOST_TERMS && term > sum * 1e-17; n++) {
      term *= x / (a + n);
      sum += term;
    }
    return 1 - front * sum;
  }
  // Lentz's evaluation of the continued fraction.
  let b = x + 1 - a;
  let c = Number.MAX_VALUE;
  let d = 1 / b;
  let fraction = d;
  for (let n = 1; n < MOST_TERMS; n++) {
    const numerator = -n * (n - a);
    b += 2;
    d = 1 / (numerator * d + b);
    c = b + numerator / c;
    fraction *= c * d;
    if (Math.abs(c * d - 1) < 1e-15) break;
  }
  return front * fraction;
}

/** Probability that a chi-square by chance reaches this value. */
export function chiSquareChance(chi2: number, degreesOfFreedom: number): number {
  return gammaQ(degreesOfFreedom / 2, chi2 / 2);
}
