import { describe, expect, it } from 'vitest';
import { makeProblem } from '../../../src/catalogue/problems.js';
import { safeText } from '../../../src/catalogue/safe-text.js';
import { PlainNight, summaryLines } from '../../../src/screens/plain/plain-night.js';
import { nightView } from '../../support/night-view.js';

describe('the night as plain lines', () => {
  it('tells each frame, problem and flag once', () => {
    const earlier = { ...nightView(6, 23), problems: nightView().problems.slice(0, 2) };
    const before = { ...earlier, shortlist: earlier.shortlist.slice(0, 4) };
    const night = new PlainNight();
    expect(night.next(before)).toHaveLength(23 + 2 + 4);
    expect(night.next(nightView())).toEqual([
      '02:41 UT  frame    field_024_V.csv: V, 399 rows, mid 02:30 UT, FWHM 2.0", zero point 23.31 mag',
      '02:41 UT  problem  focus_run.csv: no-header the first line holds numbers only. Put a line with the column names before the first row.',
      '02:41 UT  flagged  NS-0505  G6 V 0.97; faded: 0.42 ± 0.03 mag fainter in V than at 22:05 UT (14 sigma, 12 readings to 02:36 UT); imager V: 12 x 300 s, 65 min in all, S/N 52; cannot be observed: below 30 deg since 02:12 UT',
    ]);
    expect(night.next(nightView())).toEqual([]);
  });

  it('tells when a flag is taken back, and when a frame was reduced again', () => {
    const view = nightView();
    const frames = view.frames.map(frame => (frame.index === 3 ? { ...frame, rows: 12 } : frame));
    const night = new PlainNight();
    night.next(view);
    expect(night.next({ ...view, frames, shortlist: view.shortlist.slice(1) })).toEqual([
      expect.stringContaining('field_004_V.csv: V, 12 rows'),
      '02:41 UT  cleared  NS-0501: no longer flagged',
    ]);
  });

  it('tells a problem that takes the place of another, and one that comes back only once', () => {
    const half = makeProblem('row-width', safeText('v.csv'), 9, '2 cells where the header has 4');
    const empty = makeProblem('empty-file', safeText('w.csv'), 0, 'no rows');
    const night = new PlainNight();
    const lines = (...problems: (typeof half)[]) =>
      night
        .next({ ...nightView(), problems })
        .filter(line => line.includes('problem'))
        .map(line => line.replace(/^.*problem {2}(\S+) (\S+) .*$/, '$1 $2'));
    expect(lines(half)).toEqual(['v.csv:9: row-width']);
    expect(lines(empty)).toEqual(['w.csv: empty-file']);
    expect(lines(empty, half)).toEqual([]);
  });

  it('ends with totals and the shortlist', () => {
    const lines = summaryLines(nightView());
    expect(lines[0]).toBe(
      'Northern strip 4: 24 frames read, 1 duplicate, 400 stars, 5 flagged, 3 problems (lost: 1 file, 2 rows)',
    );
    expect(lines).toHaveLength(6);
    expect(lines[1]).toContain('  1  NS-0501  D3 WD 0.99; white dwarf: M_V +11.3');
  });
});
