/**
 * Distance from one parallax under an exponentially decreasing space density: Bailer-Jones 2015, PASP 127, 994.
 * p(r) is proportional to r^2 exp(-r/L) exp(-(w - 1/r)^2 / (2 sigma^2)); negative and weak parallaxes are
 * ordinary input.
 */
export interface DistancePosterior {
  readonly mode_pc: number;
  /** Distance below which the given share of the probability lies. */
  readonly quantile_pc: (share: number) => number;
}

const GRID_POINTS = 2000;

export function distancePosterior(
  parallax_mas: number,
  sigma_mas: number,
  lengthScale_pc: number,
): DistancePosterior {
  const w = parallax_mas / 1000;
  const sigma = sigma_mas / 1000;
  const mode_pc = modeDistance_pc(w, sigma, lengthScale_pc);
  // Eight sigma of the parallax either way, unless a short length scale outweighs it and pulls the star nearer.
  const byParallax = w + 8 * sigma > 0 ? 1 / (w + 8 * sigma) : 1e-3 * lengthScale_pc;
  const nearest = 1 / mode_pc - w > 6 * sigma ? Math.min(byParallax, mode_pc / 2) : byParallax;
  const byScale = Math.max(60 * lengthScale_pc, 2 * mode_pc);
  const farthest = w > 8 * sigma ? Math.min(byScale, 1 / (w - 8 * sigma)) : byScale;
  const logDensity = (logR: number) => {
    const r = Math.exp(logR);
    return 3 * logR - r / lengthScale_pc - (w - 1 / r) ** 2 / (2 * sigma * sigma);
  };
  // Even in log r, so that near and far are equally well sampled.
  const start = Math.log(nearest);
  const step = (Math.log(farthest) - start) / (GRID_POINTS - 1);
  const logs = Float64Array.from({ length: GRID_POINTS }, (_, i) => logDensity(start + i * step));
  const largest = logs.reduce((a, b) => Math.max(a, b));
  const sums = new Float64Array(GRID_POINTS);
  for (let i = 1; i < GRID_POINTS; i++) {
    sums[i] = sums[i - 1] + (Math.exp(logs[i - 1] - largest) + Math.exp(logs[i] - largest)) / 2;
  }
  return {
    mode_pc,
    quantile_pc: share => {
      const target = share * sums[GRID_POINTS - 1];
      const i = Math.max(
        1,
        sums.findIndex(sum => sum >= target),
      );
      return Math.exp(start + (i - 1 + (target - sums[i - 1]) / (sums[i] - sums[i - 1])) * step);
    },
  };
}

/**
 * The mode: root of r^3/L - 2 r^2 + (w/sigma^2) r - 1/sigma^2 = 0. Of three real roots the smallest positive one,
 * unless the parallax is negative (then only one is positive).
 */
function modeDistance_pc(w: number, sigma: number, scale: number): number {
  const cubic = (r: number) => r ** 3 / scale - 2 * r * r + (w * r - 1) / (sigma * sigma);
  // The derivative's roots part the axis into pieces on which the cubic is monotone.
  const root = 4 - (3 * w) / (sigma * sigma * scale);
  const turning = root > 0 ? [((2 - Math.sqrt(root)) * scale) / 3, ((2 + Math.sqrt(root)) * scale) / 3] : [];
  const edges = [0, ...turning.filter(r => r > 0), Number.POSITIVE_INFINITY];
  for (let i = 0; i + 1 < edges.length; i++) {
    const low = edges[i];
    let high = edges[i + 1];
    if (high === Number.POSITIVE_INFINITY) {
      high = Math.max(2 * low, scale);
      while (cubic(high) < 0) high *= 2;
    }
    if (cubic(low) <= 0 && cubic(high) >= 0) return bisect(cubic, low, high);
  }
  return Number.NaN;
}

function bisect(f: (x: number) => number, low: number, high: number): number {
  for (let i = 0; i < 200 && high - low > 1e-12 * high; i++) {
    const middle = (low + high) / 2;
    if (f(middle) < 0) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}
