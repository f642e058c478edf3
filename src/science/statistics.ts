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

/** Third quartile minus first: 1.349 sigma of a Gaussian. */
export function interquartileRange(values: ArrayLike<number>): number {
  return quantile(values, 0.75) - quantile(values, 0.25);
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

/** Probability that a Gaussian deviate exceeds z sigma. */
export function gaussianUpperTail(z: number): number {
  const tail = gammaQ(0.5, (z * z) / 2) / 2;
  return z >= 0 ? tail : 1 - tail;
}

/**
 * Regularised incomplete beta function I_x(a, b), a, b > 0, 0 <= x <= 1 (Abramowitz & Stegun 1964, 26.5.8: continued
 * fraction, evaluated from the side where it converges fast).
 */
export function incompleteBeta(x: number, a: number, b: number): number {
  if (!(x >= 0 && x <= 1)) return Number.NaN;
  if (x === 0 || x === 1) return x;
  if (x > (a + 1) / (a + b + 2)) return 1 - incompleteBeta(1 - x, b, a);
  const front = Math.exp(logGamma(a + b) - logGamma(a) - logGamma(b) + a * Math.log(x) + b * Math.log1p(-x));
  let c = 1;
  let d = 1 / (1 - ((a + b) * x) / (a + 1));
  let fraction = d;
  for (let m = 1; m < MOST_TERMS; m++) {
    const even = (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m));
    d = 1 / (1 + even * d);
    c = 1 + even / c;
    fraction *= c * d;
    const odd = (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1));
    d = 1 / (1 + odd * d);
    c = 1 + odd / c;
    fraction *= c * d;
    if (Math.abs(c * d - 1) < 1e-15) break;
  }
  return (front * fraction) / a;
}

/** Smallest probability that is worked with: its logarithm has to be finite. */
const LEAST_CHANCE = 1e-300;

/**
 * One chance from several independent ones: -2 sum ln p is a chi-square with two degrees of freedom for each (Fisher
 * 1925, Statistical Methods for Research Workers).
 */
export function combinedChance(chances: readonly number[]): number {
  const chi2 = chances.reduce((sum, p) => sum - 2 * Math.log(Math.max(p, LEAST_CHANCE)), 0);
  return chiSquareChance(chi2, 2 * chances.length);
}
