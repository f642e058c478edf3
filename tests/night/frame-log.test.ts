import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { FrameLog } from '../../src/night/frame-log.js';

const bytes = (content: string) => new TextEncoder().encode(content);

describe('FrameLog', () => {
  it('other content under the same name takes the earlier place', () => {
    const log = new FrameLog();
    expect(log.decide('a', bytes('1'))).toEqual({ kind: 'new', index: 0 });
    expect(log.decide('b', bytes('2'))).toEqual({ kind: 'new', index: 1 });
    expect(log.decide('a', bytes('3'))).toEqual({ kind: 'replacement', index: 0 });
    expect(log.decide('a', bytes('3'))).toEqual({ kind: 'unchanged' });
  });

  it('content that another file still holds is not replaced', () => {
    const log = new FrameLog();
    log.decide('latest', bytes('1'));
    expect(log.decide('copy', bytes('1'))).toEqual({ kind: 'known', freed: undefined });
    expect(log.decide('latest', bytes('2'))).toEqual({ kind: 'new', index: 1 });
  });

  it('frames stand for exactly the contents that the files hold now, whatever was written in which order', () => {
    const writes = fc.array(fc.tuple(fc.constantFrom('a', 'b', 'c'), fc.constantFrom('1', '2', '3', '4')));
    fc.assert(
      fc.property(writes, steps => {
        const log = new FrameLog();
        const files = new Map<string, string>();
        const frames = new Map<number, string>();
        for (const [place, content] of steps) {
          files.set(place, content);
          const fate = log.decide(place, bytes(content));
          if (fate.kind === 'new' || fate.kind === 'replacement') frames.set(fate.index, content);
          if (fate.kind === 'known' && fate.freed !== undefined) frames.delete(fate.freed);
          expect([...frames.values()].sort()).toEqual([...new Set(files.values())].sort());
        }
      }),
      { seed: 20261108 },
    );
  });
});
