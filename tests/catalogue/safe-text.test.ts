import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { safeText } from '../../src/catalogue/safe-text.js';
import { codes, frameOf, read } from './input.js';

const ESC = '\x1b';

/** What a star's name may carry to act on the observer's terminal, and what is to be left of it. */
const ATTACKS: readonly (readonly [what: string, raw: string, clean: string])[] = [
  ['clipboard write (OSC 52)', `a${ESC}]52;c;cm0gLXJm\x07b`, 'ab'],
  ['window title (OSC 0)', `a${ESC}]0;owned${ESC}\\b`, 'ab'],
  ['hyperlink (OSC 8)', `${ESC}]8;;http://x${ESC}\\star${ESC}]8;;${ESC}\\`, 'star'],
  ['clipboard write in C1 form', 'a\x9d52;c;eA==\x9cb', 'ab'],
  ['colour (SGR)', `${ESC}[31;1mred${ESC}[0m`, 'red'],
  ['screen erased (CSI)', `a${ESC}[2J${ESC}[Hb`, 'ab'],
  ['cursor moved, C1 form', 'a\x9b10;10Hb', 'ab'],
  ['terminal reset', `a${ESC}cb`, 'ab'],
  ['character set', `a${ESC}(0b`, 'ab'],
  ['device control (DCS)', `a${ESC}P1$r0m${ESC}\\b`, 'ab'],
  ['string that never ends', `a${ESC}]0;rest of the screen`, 'a'],
  ['sequence put together by removal', `a${ESC}${ESC}[31m[31mb`, 'a\ufffd[31mb'],
  ['carriage return', 'good\rbad', 'good\ufffdbad'],
  ['bell, backspace, tab, line feed', 'a\x07\x08\t\nb', 'a\ufffd\ufffd\ufffd\ufffdb'],
  ['NUL, vertical tab, shift out, DEL', 'a\0\x0b\x0e\x7fb', 'a\ufffd\ufffd\ufffd\ufffdb'],
  ['bidi override and isolate', 'a\u202eb\u2066c\u061cd', 'a\ufffdb\ufffdc\ufffdd'],
  ['zero width and byte order mark', 'a\u200bb\u200dc\ufeffd', 'a\ufffdb\ufffdc\ufffdd'],
  ['half a surrogate pair, invisible tag', 'a\ud800b\u{e0041}c', 'a\ufffdb\ufffdc'],
];

/** Nothing that a terminal acts on, and nothing that reorders or hides text. */
const HARMLESS = /^[^\x00-\x1f\x7f-\x9f\u061c\u200b-\u200f\u202a-\u202e\u2060-\u2069\ufeff]*$/;

describe('safe text', () => {
  it('knows 18 attacks', () => expect(ATTACKS).toHaveLength(18));

  it.each(ATTACKS)('%s', (_, raw, clean) => expect(safeText(raw)).toBe(clean));

  it.each(ATTACKS)(
    '%s: in an identifier, a column name, a header value and the file name',
    async (_, raw) => {
      const cell = `"${raw.replaceAll('"', '""')}"`;
      const text = `# OBJECT = ${raw}\nid,ra,dec,V,e_V,${cell}\n${cell},10,20,12,0.01,x\n,bad,20,12,0.1,x\n`;
      const result = await read(text, {}, raw);
      const texts = [
        ...(result.frame?.ids ?? []),
        result.frame?.facts.object ?? '',
        result.frame?.facts.name ?? '',
      ];
      for (const each of [...texts, ...result.problems.flatMap(p => [p.text, p.file])])
        expect(each).toMatch(HARMLESS);
    },
  );

  it('leaves no control character of any text', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary' }), raw => {
        const clean = safeText(raw);
        expect(clean).toMatch(HARMLESS);
        expect(safeText(clean)).toBe(clean);
      }),
      { seed: 20261108, numRuns: 2000 },
    );
  });

  it('keeps letters of all scripts, composed', () => {
    expect(safeText('α Centauri, Бета, Zoe\u0308')).toBe('α Centauri, Бета, Zoë');
  });

  it('is cut to its length with a mark, never through a character', () => {
    expect(safeText('abcdef', 6)).toBe('abcdef');
    expect(safeText('abcdefg', 6)).toBe('abcde…');
    expect(safeText('abcd🌟ef', 6)).toBe('abcd…');
  });

  it('takes a megabyte of openings without trouble', () => {
    const text = `${ESC}]`.repeat(500_000);
    expect(safeText(text)).toBe('');
  });

  it('does not lose a column named __proto__', async () => {
    const text = '__proto__,id,ra,dec,constructor,V,e_V\n1,a,10,20,2,12.5,0.01\n';
    expect(codes(await read(text))).toEqual([]);
    expect((await frameOf(text, { columns: { 'mag.B': '__proto__' } })).bands.map(band => band.band)).toEqual(
      ['B', 'V'],
    );
  });
});
