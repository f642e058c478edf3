import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { describe, expect, it } from 'vitest';
import { ROOT, run } from '../support/built.js';

interface Hidden {
  readonly id: string;
  readonly kind: string;
  readonly flag: string;
}

/** Stars of the closing list in the demo's own output: '  1  IC1-0001  D3 WD 0.99; white dwarf: ...'. */
function flaggedIn(output: string): Map<string, string> {
  const closing = output.slice(output.indexOf('Invented Cluster 1:'));
  return new Map([...closing.matchAll(/^ *\d+ {2}(IC1-\d+) {2}.*$/gm)].map(match => [match[1], match[0]]));
}

describe('the demo night played to its end', () => {
  it('finds every hidden star, and at least three quarters of what it flags was hidden', async () => {
    const { code, out, err } = await run(['replay', 'demo-run', '--speed', '5000']);
    expect(err).toBe('');
    expect(code).toBe(0);
    const { stars } = JSON.parse(readFileSync(resolve(ROOT, 'demo-run/truth.json'), 'utf8')) as {
      stars: Hidden[];
    };
    const flagged = flaggedIn(out);
    for (const star of stars) {
      expect(flagged.get(star.id), `${star.kind} ${star.id}`).toMatch(
        new RegExp(`; ${star.flag.replaceAll('-', ' ')}: `),
      );
    }
    const right = [...flagged.keys()].filter(id => stars.some(star => star.id === id)).length;
    expect(right / flagged.size).toBeGreaterThanOrEqual(0.75);
    // The broken file, the duplicate and the one in pieces.
    expect(out).toMatch(/problem {2}frame-09-B-crashed\.csv: not-a-table/);
    expect(out).toMatch(/37 frames read, 1 duplicate, 1 510 stars, 13 flagged, 1 problem \(lost: 1 file\)/);
  }, 60_000);
});
