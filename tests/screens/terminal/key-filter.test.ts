import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { KeyFilter } from '../../../src/screens/terminal/key-filter.js';
import type { KeyPress } from '../../../src/screens/terminal/key-press.js';

/** A filter whose only timer is fired by hand. */
function makeFilter() {
  const keys: KeyPress[] = [];
  const reports: string[] = [];
  let pending: (() => void) | undefined;
  const filter = new KeyFilter(
    { onKey: key => keys.push(key), onReport: report => reports.push(report) },
    50,
    {
      set: callback => {
        pending = callback;
        return callback;
      },
      clear: () => {
        pending = undefined;
      },
    },
  );
  return {
    keys,
    reports,
    push: (text: string) => filter.push(Buffer.from(text)),
    pushBytes: (bytes: Uint8Array) => filter.push(bytes),
    wait: () => pending?.(),
  };
}

const named = (keys: readonly KeyPress[]) =>
  keys.map(key =>
    key.name === 'char'
      ? `${key.ctrl ? '^' : ''}${key.meta ? 'M-' : ''}${key.char}`
      : key.name === 'paste'
        ? `paste:${key.text}`
        : key.name,
  );

describe('KeyFilter', () => {
  it.each([
    ['jjj', ['j', 'j', 'j']],
    ['\x1b[A\x1b[B\x1bOC\x1bOD', ['up', 'down', 'right', 'left']],
    ['\x1b[5~\x1b[6~\x1b[H\x1b[4~', ['pageup', 'pagedown', 'home', 'end']],
    ['\r\t\x7f', ['return', 'tab', 'backspace']],
    ['\x03\x1a\0', ['^c', '^z', '^ ']],
    ['\x1b[1;5Aq', ['up', 'q']],
    ['\x1b[12\x1b[A', ['up']],
    ['\x1b[1;é', ['é']],
    ['\x1b\x1b[B', ['escape', 'down']],
    ['é⠿', ['é', '⠿']],
    ['\x1bx', ['M-x']],
    ['\x1b[200~two\nlines\x1b[201~q', ['paste:two\nlines', 'q']],
  ])('%j', (typed, expected) => {
    const filter = makeFilter();
    filter.push(typed);
    expect(named(filter.keys)).toEqual(expected);
  });

  it('an escape alone is Esc after the wait, and the beginning of an arrow before it', () => {
    const filter = makeFilter();
    filter.push('\x1b');
    expect(filter.keys).toEqual([]);
    filter.push('[A');
    filter.push('\x1b');
    filter.wait();
    expect(named(filter.keys)).toEqual(['up', 'escape']);
  });

  it('modifiers come with the key', () => {
    const filter = makeFilter();
    filter.push('\x1b[1;6C\x1b[Z\x1b[3;3~');
    expect(filter.keys).toMatchObject([
      { name: 'right', ctrl: true, shift: true, meta: false },
      { name: 'tab', shift: true },
      { name: 'delete', meta: true, ctrl: false },
    ]);
  });

  it('a paste in pieces is one event, with its escapes as text', () => {
    const filter = makeFilter();
    for (const piece of ['\x1b[20', '0~a\x1b[A', 'b\x1b[2', '01~', 'q']) filter.push(piece);
    expect(named(filter.keys)).toEqual(['paste:a\x1b[Ab', 'q']);
  });

  it('a paste or a report without an end does not take the keys with it for ever', () => {
    const filter = makeFilter();
    filter.push('\x1b[200~cut off');
    filter.wait();
    filter.push(`\x1b]${'x'.repeat(5000)}`);
    filter.push('q');
    expect(named(filter.keys)).toEqual(['paste:cut off', 'q']);
  });

  it('characters cut in two by the line arrive whole', () => {
    const filter = makeFilter();
    const bytes = Buffer.from('±');
    filter.pushBytes(bytes.subarray(0, 1));
    filter.pushBytes(bytes.subarray(1));
    expect(named(filter.keys)).toEqual(['±']);
  });

  it('keeps reports and unknown sequences from the keys', () => {
    const filter = makeFilter();
    filter.push('\x1b[0n\x1b[1;5P\x1b[25;5~\x1b]11;rgb:0/0/0\x07\x1b[I');
    expect(filter.keys).toEqual([]);
    expect(filter.reports).toContain('\x1b[0n');
  });

  it('never fails, whatever bytes come in whatever pieces', () => {
    fc.assert(
      fc.property(fc.array(fc.uint8Array({ maxLength: 12 }), { maxLength: 12 }), chunks => {
        const filter = makeFilter();
        for (const chunk of chunks) filter.pushBytes(chunk);
        filter.wait();
        filter.push('\x1b[201~\x07q');
        filter.wait();
        expect(named(filter.keys).at(-1)).toBe('q');
        for (const key of filter.keys) {
          if (key.name !== 'paste') expect(key.char).not.toMatch(/[\x00-\x1f\x7f-\x9f]/);
        }
      }),
      { numRuns: 500, seed: 3 },
    );
  });
});
