import { CLASSES } from '../../science/classes.js';
import type { StarRecord } from './star-record.js';

/** One way of printing stars: a line before the first, one for each star. */
export interface StarFormat {
  readonly head: string;
  readonly line: (record: StarRecord) => string;
}

export const FORMATS: Readonly<Record<'table' | 'jsonl' | 'csv', StarFormat>> = {
  jsonl: { head: '', line: record => JSON.stringify(record) },
  csv: { head: csvHead(), line: csvLine },
  table: {
    head: `${'star'.padEnd(24)} ${'mag'.padStart(7)} ${'colour'.padStart(7)} ${'abs mag'.padStart(8)}  ${'type'.padEnd(16)} ${'odds'.padStart(5)} ${'Teff K'.padStart(7)} ${'dist pc'.padStart(9)}  flags and reasons`,
    line: tableLine,
  },
};

function csvHead(): string {
  const odds = CLASSES.map(name => `odds_${name}`).join(',');
  return `id,ra_deg,dec_deg,colour,colour_sigma,abs_mag,abs_mag_sigma,spectral_type,luminosity_class,${odds},teff_K,teff_sigma_K,distance_pc,extinction_AV,extinction_AV_sigma,log_luminosity,log_luminosity_sigma,radius_Rsun,radius_sigma_Rsun,flags,because,cautions,setup,exposures,each_s,total_s,start_by`;
}

function csvLine(record: StarRecord): string {
  const [exposure] = record.exposures;
  const cells = [
    record.id,
    record.ra_deg,
    record.dec_deg,
    record.colour.value,
    record.colour.sigma,
    record.abs_mag.value,
    record.abs_mag.sigma,
    record.spectral_type,
    record.luminosity_class,
    ...CLASSES.map(name => record.odds[name]),
    record.teff_K,
    record.teff_sigma_K,
    record.distance_pc,
    record.extinction_AV,
    record.extinction_AV_sigma,
    record.log_luminosity,
    record.log_luminosity_sigma,
    record.radius_Rsun,
    record.radius_sigma_Rsun,
    record.flags.map(flag => flag.code).join(' '),
    record.flags.map(flag => flag.because).join('; '),
    record.cautions.join('; '),
    exposure?.setup ?? null,
    exposure?.count ?? null,
    exposure?.each_s ?? null,
    exposure?.total_s ?? null,
    record.window.start_by,
  ];
  return cells.map(csvCell).join(',');
}

/** Quoted where needed; text that a spreadsheet would take for a formula gets an apostrophe in front. */
export function csvCell(value: string | number | null): string {
  if (value === null) return '';
  if (typeof value === 'number') return String(value);
  const text = /^[=+\-@\t\r]/.test(value) ? `'${value}` : value;
  return /[",\n\r]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}

function tableLine(record: StarRecord): string {
  const fixed = (value: number | null | undefined, digits: number) =>
    value === null || value === undefined ? '-' : value.toFixed(digits);
  const mag = record.mags[record.abs_mag.band]?.value;
  const type = [record.spectral_type, record.luminosity_class].filter(part => part !== null).join(' ');
  const odds = record.luminosity_class === null ? null : record.odds[record.luminosity_class];
  const reasons = record.flags.map(flag => `${flag.code}: ${flag.because}`).join('; ');
  return [
    record.id.padEnd(24),
    fixed(mag, 3).padStart(7),
    fixed(record.colour.value, 3).padStart(7),
    fixed(record.abs_mag.value, 2).padStart(8),
    ` ${type.padEnd(16)}`,
    fixed(odds, 2).padStart(5),
    fixed(record.teff_K, 0).padStart(7),
    fixed(record.distance_pc, 1).padStart(9),
    ` ${reasons}`,
  ]
    .join(' ')
    .trimEnd();
}
