import { type KeyName, type KeyPress, plainKey } from './key-press.js';

/** Timers are passed in, so that tests need not wait. */
export interface Timers {
  readonly set: (callback: () => void, delay_ms: number) => unknown;
  readonly clear: (timer: unknown) => void;
}

export const REAL_TIMERS: Timers = {
  set: (callback, delay_ms) => setTimeout(callback, delay_ms),
  clear: timer => clearTimeout(timer as NodeJS.Timeout),
};

/** What comes out of the filter besides keys. */
export interface KeyFilterHandlers {
  readonly onKey: (key: KeyPress) => void;
  /** A report of the terminal, such as the answer to a status request. */
  readonly onReport: (sequence: string) => void;
}

/** A lone escape is the Esc key after this long; over a remote link its rest may be late. */
export const ESCAPE_MS = 50;
export const REMOTE_ESCAPE_MS = 100;
/** A sequence that has begun, or a paste, is waited for much longer. */
const SEQUENCE_MS = 1000;
const LONGEST_PASTE = 100_000;
/** Longer than any report: something without an end must not swallow the keys behind it for ever. */
const LONGEST_SEQUENCE = 4096;

const FINAL_KEYS: Readonly<Record<string, KeyName>> = {
  A: 'up',
  B: 'down',
  C: 'right',
  D: 'left',
  H: 'home',
  F: 'end',
  Z: 'tab',
};

const NUMBERED_KEYS: Readonly<Record<string, KeyName>> = {
  '1': 'home',
  '2': 'insert',
  '3': 'delete',
  '4': 'end',
  '5': 'pageup',
  '6': 'pagedown',
  '7': 'home',
  '8': 'end',
};

const PASTE_START = '\x1b[200~';
const PASTE_END = '\x1b[201~';

/**
 * Turns the terminal's bytes into keys, one by one: arrows in both forms, pastes as one event, the terminal's own
 * reports aside, everything unknown dropped.
 */
export class KeyFilter {
  private readonly decoder = new TextDecoder();
  private buffer = '';
  private paste: string | undefined;
  private timer: unknown;

  constructor(
    private readonly handlers: KeyFilterHandlers,
    private readonly escape_ms: number,
    private readonly timers: Timers = REAL_TIMERS,
  ) {}

  push(chunk: Uint8Array): void {
    if (this.timer !== undefined) this.timers.clear(this.timer);
    this.timer = undefined;
    this.buffer += this.decoder.decode(chunk, { stream: true });
    this.drain(false);
    if (this.buffer === '' && this.paste === undefined) return;
    const lone = this.paste === undefined && this.buffer.length === 1;
    this.timer = this.timers.set(
      () => {
        this.timer = undefined;
        this.drain(true);
      },
      lone ? this.escape_ms : SEQUENCE_MS,
    );
  }

  /** Takes as much from the buffer as can be understood; `force`: what is left will not be completed. */
  private drain(force: boolean): void {
    while (this.paste !== undefined || this.buffer !== '') {
      const taken = this.paste !== undefined ? this.takePaste(force) : this.takeOne(force);
      if (!taken) return;
    }
  }

  private takePaste(force: boolean): boolean {
    const end = this.buffer.indexOf(PASTE_END);
    const whole = end >= 0;
    if (!whole && !force) {
      this.paste = `${this.paste}${this.buffer.slice(0, -PASTE_END.length)}`.slice(0, LONGEST_PASTE);
      this.buffer = this.buffer.slice(-PASTE_END.length);
      return false;
    }
    const text = `${this.paste}${whole ? this.buffer.slice(0, end) : this.buffer}`.slice(0, LONGEST_PASTE);
    this.buffer = whole ? this.buffer.slice(end + PASTE_END.length) : '';
    this.paste = undefined;
    this.handlers.onKey({ name: 'paste', text });
    return true;
  }

  private takeOne(force: boolean): boolean {
    if (this.buffer[0] !== '\x1b') {
      const character = String.fromCodePoint(this.buffer.codePointAt(0) as number);
      this.advance(character.length);
      this.emitCharacter(character, false);
      return true;
    }
    const sequence = /^\x1b(?:\[\[[A-E]|\[[0-?]*[ -/]*[@-~]|O[@-~]|[\]P_^X][^\x07\x1b]*(?:\x07|\x1b\\))/.exec(
      this.buffer,
    )?.[0];
    if (sequence !== undefined) {
      this.advance(sequence.length);
      this.takeSequence(sequence);
      return true;
    }
    const unfinished = /^\x1b(?:\[\[?[0-?]*[ -/]*|O|[\]P_^X][^\x07]*)?$/.test(this.buffer);
    if (unfinished && !force && this.buffer.length < LONGEST_SEQUENCE) return false;
    // A sequence broken off by something that cannot belong to it.
    const broken = /^\x1b\[[0-?]*[ -/]*/.exec(this.buffer)?.[0];
    if (unfinished && this.buffer.length > 2) this.buffer = '';
    else if (!unfinished && broken !== undefined) this.advance(broken.length);
    else if (this.buffer.length === 1 || this.buffer[1] === '\x1b') {
      this.advance(1);
      this.handlers.onKey(plainKey('escape'));
    } else {
      const character = String.fromCodePoint(this.buffer.codePointAt(1) as number);
      this.advance(1 + character.length);
      this.emitCharacter(character, true);
    }
    return true;
  }

  private advance(length: number): void {
    this.buffer = this.buffer.slice(length);
  }

  private takeSequence(sequence: string): void {
    if (sequence === PASTE_START) {
      this.paste = '';
      return;
    }
    // The oldest mouse report carries three bytes behind it.
    if (sequence === '\x1b[M') {
      this.advance(3);
      return;
    }
    const key = keyOfSequence(sequence);
    if (key !== undefined) this.handlers.onKey(key);
    else this.handlers.onReport(sequence);
  }

  private emitCharacter(character: string, meta: boolean): void {
    const key = keyOfCharacter(character);
    if (key !== undefined) this.handlers.onKey(meta && key.name !== 'paste' ? { ...key, meta } : key);
  }
}

function keyOfCharacter(character: string): KeyPress | undefined {
  if (character === '\r' || character === '\n') return plainKey('return');
  if (character === '\t') return plainKey('tab');
  if (character === '\x7f' || character === '\b') return plainKey('backspace');
  const code = character.codePointAt(0) as number;
  // Ctrl-space is zero, Ctrl-A to Ctrl-Z are 1 to 26.
  if (code < 27)
    return { ...plainKey('char', code === 0 ? ' ' : String.fromCharCode(code + 96)), ctrl: true };
  if (code < 32 || (code > 0x7f && code < 0xa0)) return undefined;
  return plainKey('char', character);
}

/** Arrows and their kin, with xterm's modifier numbers; undefined for anything else. */
function keyOfSequence(sequence: string): KeyPress | undefined {
  const match = /^\x1b(?:\[(?:1;([2-8]))?([ABCDHFZ])|O([ABCDHF])|\[([1-8])(?:;([2-8]))?~)$/.exec(sequence);
  if (match === null) return undefined;
  const [, modifier, final, application, number, numberModifier] = match;
  const letter = final ?? application;
  const name = letter !== undefined ? FINAL_KEYS[letter] : NUMBERED_KEYS[number];
  const bits = Number(modifier ?? numberModifier ?? 1) - 1;
  return {
    name,
    char: '',
    shift: (bits & 1) !== 0 || letter === 'Z',
    meta: (bits & 2) !== 0,
    ctrl: (bits & 4) !== 0,
  };
}
