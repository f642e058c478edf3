import { describe, expect, it } from 'vitest';
import type { Overlay } from '../../../src/screens/terminal/canvas.js';
import { InkOutput } from '../../../src/screens/terminal/ink-output.js';
import { HandClock } from './hand-clock.js';

const REQUEST = '\x1b[5n';

function makeOutput({ paced = false, sinkTakes_ms = 0 } = {}) {
  const clock = new HandClock();
  const written: string[] = [];
  const overlays: Overlay[] = [];
  const sink = (text: string) => {
    written.push(text);
    clock.work(sinkTakes_ms);
  };
  const output = new InkOutput(40, 5, sink, () => overlays, paced, clock.now_ms, clock.timers);
  return { output, clock, written, overlays };
}

describe('the pace', () => {
  it('frames that come together are written as one, the newest', () => {
    const { output, clock, written } = makeOutput();
    output.write('one');
    output.write('two');
    clock.pass(0);
    expect(written).toHaveLength(1);
    expect(written[0]).toContain('two');
    expect(written[0]).not.toContain('one');
  });

  it.each([
    ['twenty a second', 0, 20],
    ['ten a second where writing takes long', 30, 10],
  ])('%s, however many come', (_, sinkTakes_ms, perSecond) => {
    const { output, clock, written } = makeOutput({ sinkTakes_ms });
    for (let i = 0; i < 1000; i++) {
      output.write(`frame ${i}`);
      clock.pass(1);
    }
    expect(written.length).toBeLessThanOrEqual(perSecond + 1);
    expect(written.length).toBeGreaterThan(perSecond / 2);
    output.write('LAST');
    clock.pass(200);
    expect(written.at(-1)).toContain('LAST');
  });

  it('a frame that changes nothing writes nothing', () => {
    const { output, clock, written } = makeOutput();
    output.write('same');
    clock.pass(1000);
    output.write('same');
    clock.pass(1000);
    expect(written).toHaveLength(1);
  });

  it('canvases are drawn with the frame they belong to, and alone when only they change', () => {
    const { output, clock, written, overlays } = makeOutput();
    output.touch();
    clock.pass(100);
    expect(written).toHaveLength(0);
    output.write('frame');
    overlays.push({ x: 0, y: 1, lines: ['picture'] });
    output.touch();
    clock.pass(100);
    expect(written).toHaveLength(1);
    expect(written[0]).toMatch(/frame.*picture/s);
    overlays[0] = { x: 0, y: 1, lines: ['picturE'] };
    output.touch();
    clock.pass(100);
    expect(written[1]).toMatch(/^\x1b\[2;7HE$/);
  });

  it('a new size, and a redraw, paint everything', () => {
    const { output, clock, written } = makeOutput();
    let resized = 0;
    output.on('resize', () => resized++);
    output.write('frame');
    clock.pass(100);
    output.resize(30, 4);
    clock.pass(100);
    output.redraw();
    clock.pass(100);
    expect(resized).toBe(1);
    expect(output.columns).toBe(30);
    expect(written.slice(1)).toEqual([written[0], written[0]]);
  });
});

describe('over a remote link', () => {
  it('a terminal that answers is waited for', () => {
    const { output, clock, written } = makeOutput({ paced: true });
    output.write('one');
    clock.pass(10);
    output.answered();
    output.write('two');
    clock.pass(100);
    expect(written[1]).toContain(REQUEST);
    output.write('three');
    output.write('four');
    clock.pass(1000);
    expect(written).toHaveLength(2);
    output.answered();
    clock.pass(100);
    expect(written).toHaveLength(3);
    expect(written[2]).toContain('four');
  });

  it('a terminal that does not answer is asked once and holds nothing up', () => {
    const { output, clock, written } = makeOutput({ paced: true });
    for (let i = 0; i < 100; i++) {
      output.write(`frame ${i}`);
      clock.pass(60);
    }
    expect(written).toHaveLength(100);
    expect(written.filter(text => text.includes(REQUEST))).toHaveLength(1);
  });

  it('one answer that is lost does not stop the screen', () => {
    const { output, clock, written } = makeOutput({ paced: true });
    output.write('one');
    clock.pass(10);
    output.answered();
    output.write('two');
    clock.pass(100);
    output.write('LAST');
    clock.pass(5000);
    expect(written.at(-1)).toContain('LAST');
  });

  it('a pause lasts until the terminal owes nothing, a second at most, and writes nothing more', async () => {
    const { output, clock, written } = makeOutput({ paced: true });
    output.write('one');
    clock.pass(10);
    let settled = false;
    const paused = output.pause().then(() => {
      settled = true;
    });
    output.write('two');
    clock.pass(900);
    await Promise.resolve();
    expect(settled).toBe(false);
    output.answered();
    await paused;
    expect(written).toHaveLength(1);

    output.resume();
    clock.pass(100);
    expect(written[1]).toMatch(/two/);
    const again = output.pause();
    clock.pass(1000);
    await again;
  });

  it('without anything owed a pause is over at once', async () => {
    const { output, clock } = makeOutput();
    output.write('one');
    clock.pass(10);
    await output.pause();
  });
});
