import { formatDec, formatRa } from '../../catalogue/coordinates/format-angle.js';
import type { NightView } from '../../night/view.js';
import { colourName } from '../../science/bands.js';
import { oddsText } from '../../science/odds/index.js';
import { flagCodesOf, type SortKey } from '../state/table-rows.js';
import { flagLabel, typeText } from './star-words.js';
import { fixed, signed, toWidth, toWidthRight } from './text.js';

/** One column of the star table. */
export interface StarColumn {
  readonly title: string;
  readonly width: number;
  readonly alignRight: boolean;
  /** The order that this column is about. */
  readonly sort?: SortKey;
  readonly text: (view: NightView, star: number) => string;
}

/** A cell of the table costs its text, a blank on each side and a line. */
const COLUMN_COST = 3;
const TABLE_COST = 1;
const LEAST_ID_WIDTH = 12;
/** Room for a designation by position. */
const FULL_ID_WIDTH = 19;
/** Columns that come before the identifier gets its full width. */
const WANTED = 7;

/** Columns from the left, those that fit; the identifier takes what is left over. */
export function starColumns(view: NightView, width: number): readonly StarColumn[] {
  const [id, ...others] = allColumns(view);
  const chosen = [id];
  let free = width - TABLE_COST - COLUMN_COST - LEAST_ID_WIDTH;
  let idWidth = LEAST_ID_WIDTH;
  const widen = () => {
    const more = Math.max(0, Math.min(free, FULL_ID_WIDTH - idWidth));
    idWidth += more;
    free -= more;
  };
  for (const column of others) {
    if (chosen.length > WANTED) widen();
    if (column.width + COLUMN_COST > free) break;
    free -= column.width + COLUMN_COST;
    chosen.push(column);
  }
  widen();
  chosen[0] = { ...id, width: idWidth };
  return chosen;
}

/** Text of a cell, exactly as wide as its column. */
export function cellText(column: StarColumn, view: NightView, star: number): string {
  const text = column.text(view, star);
  return column.alignRight ? toWidthRight(text, column.width) : toWidth(text, column.width);
}

function allColumns({ axes }: NightView): readonly StarColumn[] {
  const { band } = axes;
  return [
    left('star', LEAST_ID_WIDTH, ({ stars }, star) => stars.ids[star], 'id'),
    left('type', 9, ({ stars }, star) => typeText(stars, star), 'type'),
    right('odds', 4, ({ stars }, star) => odds(stars.classOdds[star]), 'odds'),
    right(band, 5, ({ stars }, star) => fixed(stars.mag[star], 2), 'mag'),
    right(colourName(axes.colour), 5, ({ stars }, star) => fixed(stars.colour[star], 2), 'colour'),
    right(`M_${band}`, 5, ({ stars }, star) => signed(stars.absMag[star], 1), 'absMag'),
    left('flags', 13, flagsOf, 'merit'),
    right('n', 4, ({ stars }, star) => String(stars.readings[star]), 'readings'),
    left('RA Dec', 23, ({ stars }, star) => position(stars.ra_deg[star], stars.dec_deg[star])),
    right('Teff K', 6, ({ stars }, star) => kelvin(stars.teff_K[star])),
    right('err M', 5, ({ stars }, star) => fixed(stars.absMagSigma[star], 2)),
  ];
}

type TextOf = StarColumn['text'];

function left(title: string, width: number, text: TextOf, sort?: SortKey): StarColumn {
  return { title, width, alignRight: false, text, ...(sort === undefined ? {} : { sort }) };
}

function right(title: string, width: number, text: TextOf, sort?: SortKey): StarColumn {
  return { ...left(title, width, text, sort), alignRight: true };
}

/** The first flag, and how many more there are. */
function flagsOf({ stars }: NightView, star: number): string {
  const codes = flagCodesOf(stars, star);
  if (codes.length < 2) return codes.map(flagLabel).join('');
  return `${toWidth(flagLabel(codes[0]), 10).trimEnd()} +${codes.length - 1}`;
}

function odds(value: number): string {
  return Number.isNaN(value) ? '-' : oddsText(value);
}

function kelvin(teff_K: number): string {
  return Number.isNaN(teff_K) ? '-' : String(Number(teff_K.toPrecision(3)));
}

function position(ra_deg: number, dec_deg: number): string {
  return Number.isNaN(ra_deg + dec_deg) ? '-' : `${formatRa(ra_deg, 2)} ${formatDec(dec_deg, 1)}`;
}
