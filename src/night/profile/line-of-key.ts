/**
 * Finds the line of a key in TOML text, for messages: the n-th [[table]] or the [table] of the path, then the
 * key under it. A key that is not there points at its table; what cannot be found, at line 1.
 */
export function lineOfKey(text: string, path: readonly PropertyKey[]): number {
  const lines = text.split(/\r?\n/);
  const names = path.filter(part => typeof part === 'string');
  const occurrence = path.find(part => typeof part === 'number') ?? 0;
  for (let depth = names.length; depth > 0; depth--) {
    const table = names.slice(0, depth).join('.');
    const start = lineOfTable(lines, table, Number(occurrence));
    if (start < 0) continue;
    const rest = names.slice(depth);
    const line = rest.length > 0 ? lineInTable(lines, start, rest[0]) : start;
    return (line < 0 ? start : line) + 1;
  }
  const top = names.length > 0 ? lineInTable(lines, -1, names[0]) : -1;
  return top < 0 ? 1 : top + 1;
}

function lineOfTable(lines: readonly string[], table: string, occurrence: number): number {
  let seen = 0;
  for (let i = 0; i < lines.length; i++) {
    const match = /^\s*(\[\[?)\s*([\w."-]+)\s*\]\]?/.exec(lines[i]);
    if (match === null || match[2].replaceAll('"', '') !== table) continue;
    if (match[1] === '[' || seen === occurrence) return i;
    seen++;
  }
  return -1;
}

function lineInTable(lines: readonly string[], start: number, key: string): number {
  for (let i = start + 1; i < lines.length; i++) {
    if (/^\s*\[/.test(lines[i])) return -1;
    const match = /^\s*"?([\w.-]+)"?\s*=/.exec(lines[i]);
    if (match !== null && match[1].split('.')[0] === key.split('.')[0]) return i;
  }
  return -1;
}
