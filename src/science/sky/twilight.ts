/**
 * Zenith brightness in twilight, mag/arcsec^2, for the Sun 5 to 15 degrees below the horizon: Patat, Ugolnikov &
 * Postylyakov 2006, A&A 455, 385, Table 3 (coefficients from memory), a0 + a1 x + a2 x^2 with x = depression - 5.
 */
const FITS: readonly {
  readonly wavelength_nm: number;
  readonly fit: readonly number[];
  readonly dark: number;
}[] = [
  { wavelength_nm: 366, fit: [11.78, 1.376, -0.039], dark: 22.28 },
  { wavelength_nm: 438, fit: [11.84, 1.411, -0.041], dark: 22.64 },
  { wavelength_nm: 545, fit: [11.84, 1.518, -0.057], dark: 21.61 },
  { wavelength_nm: 641, fit: [11.4, 1.567, -0.064], dark: 20.87 },
  { wavelength_nm: 798, fit: [10.93, 1.47, -0.062], dark: 19.71 },
];

const SHALLOWEST_DEG = 5;
const DEEPEST_FIT_DEG = 15;
/** Below this the Sun adds nothing. */
const NIGHT_DEG = 18;

/** The published fit itself, night sky included; NaN outside 5 to 15 degrees. Nearest tabulated band. */
export function zenithTwilight_magPerArcsec2(sunDepression_deg: number, wavelength_nm: number): number {
  if (!(sunDepression_deg >= SHALLOWEST_DEG && sunDepression_deg <= DEEPEST_FIT_DEG)) return Number.NaN;
  const [a0, a1, a2] = nearest(wavelength_nm).fit;
  const x = sunDepression_deg - SHALLOWEST_DEG;
  return a0 + a1 * x + a2 * x * x;
}

/**
 * What twilight alone adds, mag/arcsec^2; infinite when nothing. The fits contain the night sky of their site, which is
 * taken off; beyond 15 degrees the rest fades out towards 18. With the Sun less than 5 degrees down: NaN, too bright.
 */
export function twilightAlone_magPerArcsec2(sunDepression_deg: number, wavelength_nm: number): number {
  if (sunDepression_deg >= NIGHT_DEG) return Number.POSITIVE_INFINITY;
  const { dark } = nearest(wavelength_nm);
  const fitted = zenithTwilight_magPerArcsec2(Math.min(sunDepression_deg, DEEPEST_FIT_DEG), wavelength_nm);
  const light = Math.max(0, 10 ** (-0.4 * fitted) - 10 ** (-0.4 * dark));
  const fading = Math.min(1, (NIGHT_DEG - sunDepression_deg) / (NIGHT_DEG - DEEPEST_FIT_DEG));
  return -2.5 * Math.log10(light * fading);
}

function nearest(wavelength_nm: number) {
  return FITS.reduce((best, fit) =>
    Math.abs(fit.wavelength_nm - wavelength_nm) < Math.abs(best.wavelength_nm - wavelength_nm) ? fit : best,
  );
}
