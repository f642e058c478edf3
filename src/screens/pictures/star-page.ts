import { formatDec, formatRa } from '../../catalogue/coordinates/format-angle.js';
import type { ExposureSuggestion } from '../../follow/exposure/suggestion.js';
import type { StarDetail } from '../../night/view.js';
import { stellarRadius } from '../../science/luminosity.js';
import { glyphsOf } from '../terminal/glyphs.js';
import { Grid } from '../terminal/grid.js';
import type { GlyphName } from '../terminal/look.js';
import { evidenceLines } from './evidence-lines.js';
import { lightCurvePicture } from './light-curve.js';
import { oddsBars } from './odds-bars.js';
import { dim, type Line, pageOf, plain, title } from './parts.js';
import { byOdds, exposureShort, flagWords, startByWords, urgencyOf } from './star-words.js';
import { clockText, durationText, fixed, sentence, teffText, toWidth, withSigma, wrapped } from './text.js';

const COLUMN_GAP = 3;
const MOST_ODDS = 5;
const LEAST_CURVE_ROWS = 7;
const MOST_CURVE_ROWS = 16;
const LABEL_WIDTH = 11;

/**
 * Everything about one star: why, until when, how long; below side by side what it is and how it behaved. At
 * least `height` rows; the light curve takes what is left.
 */
export function starPage(
  detail: StarDetail,
  now_ms: number,
  width: number,
  height: number,
  glyphs: GlyphName,
): Grid {
  const top = [
    ...heading(detail),
    ...reasons(detail, width, glyphs),
    ...times(detail, now_ms, width),
    [],
    ...exposures(detail, width),
    [],
  ];
  const half = Math.floor((width - COLUMN_GAP) / 2);
  const left = [
    ...oddsLines(detail, half, glyphs),
    [],
    ...numbers(detail, glyphs),
    [],
    ...evidenceLines(detail.evidence, half),
  ];
  const magnitudes = magnitudeLines(detail, glyphs);
  const curveRows = Math.min(
    MOST_CURVE_ROWS,
    Math.max(LEAST_CURVE_ROWS, height - top.length - magnitudes.length, left.length - magnitudes.length),
  );
  const curves = detail.lightCurves.map(curve => lightCurvePicture(curve, half, curveRows, glyphs));
  const right = stacked([pageOf(magnitudes, half), ...curves], half);
  const page = new Grid(width, Math.max(height, top.length + Math.max(left.length, right.height)));
  page.paste(0, 0, pageOf(top, width));
  page.paste(0, top.length, pageOf(left, half));
  page.paste(half + COLUMN_GAP, top.length, right);
  return page;
}

function heading(detail: StarDetail): Line[] {
  const position = Number.isNaN(detail.ra_deg + detail.dec_deg)
    ? 'position not known'
    : `${formatRa(detail.ra_deg, 2)} ${formatDec(detail.dec_deg, 1)}`;
  return [[title(detail.id), plain(`  ${detail.spectralType}`), dim(`  ${position}`)]];
}

function reasons(detail: StarDetail, width: number, glyphs: GlyphName): Line[] {
  if (detail.flags.length === 0 && detail.cautions.length === 0)
    return [[dim('Not flagged: nothing unusual about it so far.')]];
  return [
    ...byOdds(detail.flags).flatMap(flag =>
      wrapped(sentence(`${flagWords(flag.code)}: ${flag.because}`, glyphs), width).map(text => [plain(text)]),
    ),
    ...detail.cautions.flatMap(caution => warningLines(sentence(`but ${caution}`, glyphs), width)),
  ];
}

function times({ window }: StarDetail, now_ms: number, width: number): Line[] {
  const soon = urgencyOf(window, now_ms) === 'soon';
  const until = Number.isNaN(window.upUntil_ms)
    ? ''
    : `; observable until ${clockText(window.upUntil_ms)} UT`;
  const now =
    window.altitudeNow_deg > 0
      ? `now ${window.altitudeNow_deg.toFixed(0)} deg high, airmass ${fixed(window.airmassNow, 2)}`
      : 'now below the horizon';
  return wrapped(`${startByWords(window, now_ms)}${until}; ${now}`, width).map(text => [
    { text, style: soon ? { colour: 'alarm', bold: true } : { colour: 'good' } },
  ]);
}

/** One line a setup: how long, in all with its range, what limits it; below what to mind. */
function exposures(detail: StarDetail, width: number): Line[] {
  if (detail.exposures.length === 0) return [[dim('No follow-up setup in the profile.')]];
  const setupWidth = Math.max(8, ...detail.exposures.map(exposure => exposure.setup.length)) + 2;
  const head = `${'setup'.padEnd(setupWidth)}${'mag'.padEnd(7)}${'exposure'.padEnd(12)}${'in all'.padEnd(18)}${'S/N'.padEnd(5)}limited by`;
  return [
    [dim(head)],
    ...detail.exposures.map(exposure => exposureLine(exposure, setupWidth)),
    ...detail.exposures
      .filter(({ caution }) => caution !== '')
      .flatMap(({ setup, caution }) => warningLines(`${setup}: ${caution}`, width)),
  ];
}

function warningLines(text: string, width: number): Line[] {
  return wrapped(text, width).map(line => [{ text: line, style: { colour: 'warning' } }]);
}

function exposureLine(exposure: ExposureSuggestion, setupWidth: number): Line {
  const start = `${exposure.setup.padEnd(setupWidth)}${fixed(exposure.predicted_mag, 1).padEnd(7)}`;
  if (!exposure.possible) return [plain(start), { text: exposure.limitedBy, style: { colour: 'warning' } }];
  const how = exposureShort(exposure).padEnd(12);
  return [
    plain(start),
    { text: how, style: { bold: true } },
    plain(`${totalText(exposure).padEnd(18)}${exposure.snr.toFixed(0).padEnd(5)}`),
    dim(exposure.limitedBy),
  ];
}

/** '15 min (13-18)': the range is one sigma of the predicted magnitude. */
function totalText({ total_s, totalBright_s, totalFaint_s }: ExposureSuggestion): string {
  const total = durationText(total_s);
  if (Number.isNaN(totalBright_s + totalFaint_s)) return total;
  const unit = total_s < 90 ? 1 : 60;
  const [low, high] = [Math.round(totalBright_s / unit), Math.round(totalFaint_s / unit)];
  return low === high ? total : `${total} (${low}-${high})`;
}

function oddsLines(detail: StarDetail, width: number, glyphs: GlyphName): Line[] {
  return [[dim('odds')], ...oddsBars(detail.odds, width, MOST_ODDS, glyphs)];
}

function numbers(detail: StarDetail, glyphs: GlyphName): Line[] {
  const { plusMinus } = glyphsOf(glyphs);
  const { band, value, sigma } = detail.absMag;
  const rows: readonly (readonly [string, string])[] = [
    [`M_${band}`, `${value > 0 ? '+' : ''}${withSigma(value, sigma, plusMinus)}`],
    ['Teff', temperature(detail, plusMinus)],
    ['parallax', withUnit(withSigma(detail.parallax_mas, detail.parallaxSigma_mas, plusMinus), 'mas')],
    ['distance', distanceText(detail)],
    ['A_V', withUnit(withSigma(detail.extinction_AV, detail.extinctionSigma_AV, plusMinus), 'mag')],
    ['L, R', luminosityText(detail, plusMinus)],
  ];
  return rows.map(([label, text]) => [dim(label.padEnd(LABEL_WIDTH)), plain(text)]);
}

function temperature({ teff_K, teffSigma_K }: StarDetail, plusMinus: string): string {
  const teff = teffText(teff_K);
  return Number.isNaN(teff_K + teffSigma_K)
    ? teff
    : teff.replace(' K', ` ${plusMinus} ${teffText(teffSigma_K)}`);
}

/** '25 Suns, 9.7 ± 0.4 R': how bright and how large it really is. */
function luminosityText(detail: StarDetail, plusMinus: string): string {
  if (Number.isNaN(detail.logLuminosity)) return 'not known';
  const { radius_Rsun, sigma_Rsun } = stellarRadius(detail);
  const suns = Number((10 ** detail.logLuminosity).toPrecision(2));
  return `${suns} Suns, ${withSigma(radius_Rsun, sigma_Rsun, plusMinus)} R`;
}

function withUnit(text: string, unit: string): string {
  return text === '-' ? 'not known' : `${text} ${unit}`;
}

function distanceText({ distance_pc, distanceLow_pc, distanceHigh_pc }: StarDetail): string {
  if (Number.isNaN(distance_pc)) return 'not known';
  const figure = (value: number) => String(Number(value.toPrecision(3)));
  const range = Number.isNaN(distanceLow_pc + distanceHigh_pc)
    ? ''
    : ` (${figure(distanceLow_pc)}-${figure(distanceHigh_pc)})`;
  return `${figure(distance_pc)}${range} pc`;
}

function magnitudeLines(detail: StarDetail, glyphs: GlyphName): Line[] {
  const { plusMinus } = glyphsOf(glyphs);
  const head = `${'band'.padEnd(6)}${'mag'.padEnd(17)}${'n'.padStart(4)}${'scatter'.padStart(9)}`;
  return [
    [dim(head)],
    ...detail.mags.map(({ band, mag, sigma_mag, readings, scatter_mag }): Line => {
      const value = `${fixed(mag, 3)} ${plusMinus} ${fixed(sigma_mag, 3)}`;
      return [
        plain(
          `${band.padEnd(6)}${toWidth(value, 17)}${String(readings).padStart(4)}${fixed(scatter_mag, 3).padStart(9)}`,
        ),
      ];
    }),
    [],
  ];
}

function stacked(pictures: readonly Grid[], width: number): Grid {
  const page = new Grid(
    width,
    pictures.reduce((sum, picture) => sum + picture.height, 0),
  );
  let y = 0;
  for (const picture of pictures) {
    page.paste(0, y, picture);
    y += picture.height;
  }
  return page;
}
