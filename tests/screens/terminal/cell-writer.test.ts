import xterm from '@xterm/headless';
import { describe, expect, it } from 'vitest';
import { CellWriter } from '../../../src/screens/terminal/cell-writer.js';

const COLUMNS = 40;
const ROWS = 8;

type Terminal = InstanceType<typeof xterm.Terminal>;

function newTerminal(): Terminal {
  return new xterm.Terminal({ cols: COLUMNS, rows: ROWS, allowProposedApi: true });
}

const show = (terminal: Terminal, text: string) =>
  new Promise<void>(resolve => terminal.write(text, resolve));

/** Characters and looks of every cell. */
function cellsOf(terminal: Terminal): string[] {
  const cells: string[] = [];
  for (let y = 0; y < ROWS; y++) {
    const line = terminal.buffer.active.getLine(y)!;
    for (let x = 0; x < COLUMNS; x++) {
      const cell = line.getCell(x)!;
      const look =
        cell.getChars() === '' || cell.getChars() === ' '
          ? `${cell.isInverse()}${cell.getBgColor()}`
          : `${cell.getFgColor()} ${cell.isBold()} ${cell.isInverse()} ${cell.getBgColor()}`;
      cells.push(`${cell.getChars() || ' '}|${cell.getWidth()}|${look}`);
    }
  }
  return cells;
}

/** A seeded stream of frames: text, colours, wide characters, small changes and great ones. */
function* frames(count: number): Generator<string> {
  let seed = 7;
  const random = (below: number) => {
    seed = (Math.imul(seed, 1_103_515_245) + 12_345) >>> 0;
    return (seed >>> 8) % below;
  };
  const pieces = [
    'abc',
    ' ',
    '    ',
    'star',
    '中文',
    '⠿⣀',
    '\x1b[31mred\x1b[0m',
    '\x1b[1;38;5;208mbold\x1b[22;39m',
    '\x1b[7minv\x1b[0m',
    '±',
    '─│',
  ];
  let lines: string[] = Array.from({ length: ROWS }, () => '');
  for (let i = 0; i < count; i++) {
    lines = lines.map(line => {
      if (random(3) > 0) return line;
      return Array.from({ length: random(9) }, () => pieces[random(pieces.length)]).join('');
    });
    yield lines.join('\n');
  }
}

describe('CellWriter', () => {
  it('leaves the terminal as a full repaint would, for 400 frames with colours and wide characters', async () => {
    const writer = new CellWriter(COLUMNS, ROWS);
    const terminal = newTerminal();
    for (const frame of frames(400)) {
      await show(terminal, writer.frame(frame));
      const fresh = newTerminal();
      await show(fresh, new CellWriter(COLUMNS, ROWS).frame(frame));
      expect(cellsOf(terminal)).toEqual(cellsOf(fresh));
    }
  });

  it('the same with pictures over it and with changes of size', async () => {
    const writer = new CellWriter(COLUMNS, ROWS);
    const terminal = newTerminal();
    let step = 0;
    for (const frame of frames(200)) {
      step++;
      // Every start and length, so that wide characters are cut on both sides.
      const lines = ['中b', 'x', '\x1b[32m中文\x1b[0m'].slice(step % 3);
      const overlays = [{ x: step % (COLUMNS + 2), y: step % ROWS, lines }];
      if (step % 50 === 0) writer.resize(COLUMNS, ROWS);
      await show(terminal, writer.frame(frame, overlays));
      const fresh = newTerminal();
      await show(fresh, new CellWriter(COLUMNS, ROWS).frame(frame, overlays));
      expect(cellsOf(terminal)).toEqual(cellsOf(fresh));
      const row =
        terminal.buffer.active.getLine(overlays[0].y)?.translateToString(false, overlays[0].x) ?? '';
      const text = lines[0].replace(/\x1b\[\d*m/g, '');
      if (overlays[0].x + 4 <= COLUMNS) expect(row.startsWith(text)).toBe(true);
    }
  });

  it('what stands behind a pictograph stays in place where the terminal draws it narrow', async () => {
    const writer = new CellWriter(COLUMNS, ROWS);
    const terminal = newTerminal();
    // The emulator keeps to Unicode 6, where the telescope is one cell wide.
    await show(terminal, writer.frame('a\u{1f52d}b|'));
    expect(terminal.buffer.active.getLine(0)?.getCell(4)?.getChars()).toBe('|');
  });

  it('writes nothing for a frame that is already shown', () => {
    const writer = new CellWriter(COLUMNS, ROWS);
    writer.frame('one\ntwo');
    expect(writer.frame('one\ntwo')).toBe('');
  });

  it('a clock costs at most 20 bytes', () => {
    const writer = new CellWriter(80, 24);
    const frame = (clock: string) => `${'x'.repeat(70)} ${clock}\n${'y'.repeat(79)}`;
    writer.frame(frame('02:41 UT'));
    expect(Buffer.byteLength(writer.frame(frame('02:42 UT')))).toBeLessThanOrEqual(20);
  });

  it('lays pictures over the frame', async () => {
    const writer = new CellWriter(COLUMNS, ROWS);
    const terminal = newTerminal();
    await show(terminal, writer.frame('left      right', [{ x: 5, y: 0, lines: ['mid', 'low'] }]));
    expect(terminal.buffer.active.getLine(0)?.translateToString(true)).toBe('left mid  right');
    expect(terminal.buffer.active.getLine(1)?.translateToString(true)).toBe('     low');
  });

  it('passes no escape sequence on but its own', () => {
    const writer = new CellWriter(COLUMNS, ROWS);
    const out = writer.frame('a\x1b]52;c;AAAA\x07b\x1b[2Jc\x07\x9b2J\x9d0;title\x9c\u202e');
    expect(out).not.toMatch(/\x1b\]/);
    expect(out.slice('\x1b[0m\x1b[H\x1b[2J'.length)).not.toMatch(/\x1b\[2J|\x07|[\x7f-\x9f\u202e]/);
  });
});
