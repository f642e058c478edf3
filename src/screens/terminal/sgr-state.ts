/** Attributes by bit: bold, dim, italic, underline, inverse, struck through. */
const ON = [1, 2, 3, 4, 7, 9];
const OFF = [22, 22, 23, 24, 27, 29];
const BOLD_OR_DIM = 0b11;

interface SgrState {
  readonly foreground: string;
  readonly background: string;
  readonly attributes: number;
}

/**
 * Numbers every combination of colours and attributes that occurs, so that cells can be compared by number, and
 * finds the shortest sequence from one to another. Number 0 is plain text.
 */
export class SgrTable {
  private readonly states: SgrState[] = [{ foreground: '', background: '', attributes: 0 }];
  private readonly numbers = new Map<string, number>([['||0', 0]]);
  private readonly applied = new Map<string, number>();
  private readonly sequences = new Map<number, string>();

  /** The state after the parameters of one SGR sequence ('1;38;5;208', '' = reset). */
  apply(from: number, parameters: string): number {
    const key = `${from};${parameters}`;
    const known = this.applied.get(key);
    if (known !== undefined) return known;
    const result = this.numberOf(change(this.states[from], parameters));
    this.applied.set(key, result);
    return result;
  }

  /** Shortest escape sequence that leads from one state to another. */
  sequence(from: number, to: number): string {
    if (from === to) return '';
    const key = from * 65_536 + to;
    const known = this.sequences.get(key);
    if (known !== undefined) return known;
    const afresh = ['', ...partsOf(this.states[to])].join(';');
    const onward = differences(this.states[from], this.states[to]).join(';');
    const sequence = `\x1b[${afresh.length <= onward.length ? afresh : onward}m`;
    this.sequences.set(key, sequence);
    return sequence;
  }

  private numberOf(state: SgrState): number {
    const key = `${state.foreground}|${state.background}|${state.attributes}`;
    const known = this.numbers.get(key);
    if (known !== undefined) return known;
    this.states.push(state);
    this.numbers.set(key, this.states.length - 1);
    return this.states.length - 1;
  }
}

function change(state: SgrState, parameters: string): SgrState {
  let { foreground, background, attributes } = state;
  const parts = parameters === '' ? ['0'] : parameters.split(';');
  for (let i = 0; i < parts.length; i++) {
    const code = Number(parts[i]);
    if (code === 0) {
      foreground = '';
      background = '';
      attributes = 0;
    } else if (code === 38 || code === 48) {
      const length = parts[i + 1] === '5' ? 3 : 5;
      const colour = parts.slice(i, i + length).join(';');
      if (code === 38) foreground = colour;
      else background = colour;
      i += length - 1;
    } else if (code === 39) foreground = '';
    else if (code === 49) background = '';
    else if ((code >= 30 && code < 38) || (code >= 90 && code < 98)) foreground = parts[i];
    else if ((code >= 40 && code < 48) || (code >= 100 && code < 108)) background = parts[i];
    else if (code === 22) attributes &= ~BOLD_OR_DIM;
    else if (ON.includes(code)) attributes |= 1 << ON.indexOf(code);
    else if (OFF.includes(code)) attributes &= ~(1 << OFF.indexOf(code));
  }
  return { foreground, background, attributes };
}

function partsOf({ foreground, background, attributes }: SgrState): string[] {
  const parts = [foreground, background].filter(part => part !== '');
  return [...parts, ...ON.filter((_, bit) => (attributes & (1 << bit)) !== 0).map(String)];
}

function differences(from: SgrState, to: SgrState): string[] {
  const parts: string[] = [];
  if (from.foreground !== to.foreground) parts.push(to.foreground || '39');
  if (from.background !== to.background) parts.push(to.background || '49');
  const gone = from.attributes & ~to.attributes;
  let added = to.attributes & ~from.attributes;
  if ((gone & BOLD_OR_DIM) !== 0) {
    // One code ends both bold and dim: what stays has to be set again.
    parts.push('22');
    added |= to.attributes & BOLD_OR_DIM;
  }
  OFF.forEach((code, bit) => {
    if (bit > 1 && (gone & (1 << bit)) !== 0) parts.push(String(code));
  });
  ON.forEach((code, bit) => {
    if ((added & (1 << bit)) !== 0) parts.push(String(code));
  });
  return parts;
}
