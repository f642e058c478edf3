import type { Conditions } from '../../night/view.js';
import { Grid } from '../terminal/grid.js';
import { dim, type Line, plain, putParts, widthOf } from './parts.js';
import { clockText, leftText, signed } from './text.js';

/** A loss of transparency by this much is cloud, not noise (judgement). */
const CLOUD_MAG = 0.15;
const GAP = '   ';

/** Tonight's sky in one line; what does not fit is left out from the right, nothing is cut. */
export function conditionsStrip(conditions: Conditions | undefined, now_ms: number, width: number): Grid {
  const grid = new Grid(width, 1);
  if (conditions === undefined) return grid;
  let x = 0;
  for (const piece of piecesOf(conditions, now_ms)) {
    if (x + widthOf(piece) > width) break;
    x = putParts(grid, x, 0, piece) + GAP.length;
  }
  return grid;
}

function piecesOf(conditions: Conditions, now_ms: number): readonly Line[] {
  const { seeing_arcsec, cloud_mag, sky_magPerArcsec2 } = conditions;
  const pieces: Line[] = [darkness(conditions, now_ms)];
  if (!Number.isNaN(seeing_arcsec)) {
    const source = conditions.seeingMeasured ? '' : ' assumed';
    pieces.push([dim('seeing '), plain(`${seeing_arcsec.toFixed(1)}"${source}`)]);
  }
  if (cloud_mag > 0) {
    const cloudy = cloud_mag >= CLOUD_MAG;
    const text = `${signed(-cloud_mag, 2)} mag${cloudy ? ' cloud?' : ''}`;
    pieces.push([dim('transparency '), cloudy ? { text, style: { colour: 'warning' } } : plain(text)]);
  }
  if (!Number.isNaN(sky_magPerArcsec2))
    pieces.push([dim('sky '), plain(`${sky_magPerArcsec2.toFixed(1)} mag/"2`)]);
  pieces.push(moon(conditions));
  return pieces;
}

function darkness({ darkFrom_ms, darkUntil_ms, darkWords }: Conditions, now_ms: number): Line {
  if (now_ms < darkFrom_ms)
    return [dim('dark from '), plain(`${clockText(darkFrom_ms)} UT, in ${leftText(now_ms, darkFrom_ms)}`)];
  if (now_ms < darkUntil_ms)
    return [
      dim('dark until '),
      plain(`${clockText(darkUntil_ms)} UT, ${leftText(now_ms, darkUntil_ms)} left`),
    ];
  return [plain(darkWords)];
}

function moon({ moonAltitude_deg, moonIllumination }: Conditions): Line {
  const lit = `${Math.round(moonIllumination * 100)} %`;
  return [
    dim('Moon '),
    plain(moonAltitude_deg > 0 ? `${lit}, ${moonAltitude_deg.toFixed(0)} deg up` : `${lit}, down`),
  ];
}
