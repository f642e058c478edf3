/**
 * Right ascension as HH:MM:SS.ss. Rounded once in units of the last digit, so that 59.999 s carries; 24 h
 * becomes 0 h.
 */
export function formatRa(ra_deg: number, decimals: number): string {
  const units = 10 ** decimals;
  const day = 86_400 * units;
  return sexagesimal(Math.round(ra_deg * 240 * units) % day, decimals);
}

/** Declination as +DD:MM:SS.s; a value that rounds to zero has a plus sign. */
export function formatDec(dec_deg: number, decimals: number): string {
  const total = Math.round(Math.abs(dec_deg) * 3600 * 10 ** decimals);
  return (dec_deg < 0 && total > 0 ? '-' : '+') + sexagesimal(total, decimals);
}

/** `total` counts units of the last digit of the seconds. */
function sexagesimal(total: number, decimals: number): string {
  const units = 10 ** decimals;
  const whole = Math.floor(total / units);
  const fraction = decimals > 0 ? `.${String(total % units).padStart(decimals, '0')}` : '';
  const pair = (value: number) => String(value).padStart(2, '0');
  return `${pair(Math.floor(whole / 3600))}:${pair(Math.floor(whole / 60) % 60)}:${pair(whole % 60)}${fraction}`;
}
