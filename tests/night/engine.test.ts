import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { gzipSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import { type FileOutcome, NightEngine } from '../../src/night/engine.js';
import { FollowUpDesk } from '../../src/night/follow-up.js';
import { parseProfile } from '../../src/night/profile/parse.js';
import { ViewMaker } from '../../src/night/view-maker.js';
import { ROOT } from '../support/built.js';

const NOW = Date.parse('2026-11-08T22:00:00Z');

const text = readFileSync(resolve(ROOT, 'profiles/northern-80cm.toml'), 'utf8');
const { profile } = parseProfile(text, 'northern-80cm.toml');

/** A Sun, a white dwarf and a giant: places, parallaxes, then magnitudes. */
const ASTROMETRY = `id,ra,dec,parallax,parallax_error
sun,30.0,45.0,10,0.1
dwarf,30.1,45.0,20,0.1
giant,30.2,45.0,2,0.05
`;
const frame = (filter: string, mags: readonly number[], shift = 0, minute = '00') =>
  `# FILTER = ${filter}\n# DATE-OBS = 2026-11-08T20:${minute}:00\n# EXPTIME = 60\n# FWHM = 2.0\nra,dec,mag,mag_error\n${mags
    .map((mag, i) => `${(30 + i / 10).toFixed(1)},45.0,${(mag + shift).toFixed(3)},0.010`)
    .join('\n')}\n`;
// V and B-V: 9.8 and 0.65; 15.0 and 0.05; 9.3 and 1.05.
const V = [9.8, 15.0, 9.3];
const B = [10.45, 15.05, 10.35];

const bytes = (content: string) => new TextEncoder().encode(content);

async function night(...files: readonly (readonly [string, string])[]) {
  const engine = new NightEngine(profile!);
  const outcomes: FileOutcome[] = [];
  for (const [name, content] of files) outcomes.push(await engine.absorb(name, bytes(content)));
  const maker = new ViewMaker(engine, new FollowUpDesk(engine));
  return { engine, outcomes, maker, view: maker.view(NOW) };
}

const whole = () => night(['a.csv', ASTROMETRY], ['b.csv', frame('B', B)], ['v.csv', frame('V', V, 0, '05')]);

describe('a night of three stars', () => {
  it('merges catalogue and frames by position, and classifies', async () => {
    const { view } = await whole();
    expect(view.stars.ids).toEqual(['sun', 'dwarf', 'giant']);
    expect(view.frames.map(({ name }) => name)).toEqual(['a.csv', 'b.csv', 'v.csv']);
    expect(view.axes).toEqual({ colour: { blue: 'B', red: 'V' }, band: 'V' });
    expect(view.stars.absMag[0]).toBeCloseTo(4.7, 1);
    expect(view.shortlist.map(entry => [entry.id, entry.flags.map(({ code }) => code)])).toEqual([
      ['dwarf', ['white-dwarf']],
    ]);
    expect(view.shortlist[0].flags[0].because).toMatch(
      /^M_V \+11\.\d at B-V 0\.05 lies \d+\.\d mag below the dwarfs/,
    );
  });

  it('gives the same stars in whatever order the files come', async () => {
    const forward = (await whole()).view;
    const { view: backward } = await night(
      ['v.csv', frame('V', V, 0, '05')],
      ['b.csv', frame('B', B)],
      ['a.csv', ASTROMETRY],
    );
    expect([...backward.stars.absMag].map(mag => mag.toFixed(3))).toEqual(
      [...forward.stars.absMag].map(mag => mag.toFixed(3)),
    );
    expect(backward.shortlist.map(entry => entry.flags[0].code)).toEqual(['white-dwarf']);
    // The identifiers came last and were taken over all the same.
    expect(backward.stars.ids).toEqual(['sun', 'dwarf', 'giant']);
  });

  it('counts the same content once, under whatever name', async () => {
    const { outcomes, view } = await night(
      ['v.csv', frame('V', V)],
      ['copy.csv', frame('V', V)],
      ['v.csv', frame('V', V)],
    );
    // The third is the first file again, merely touched: no duplicate.
    expect(outcomes.map(({ kind }) => kind)).toEqual(['read', 'known', 'unchanged']);
    expect(view.duplicates).toBe(1);
    expect(view.stars.readings[0]).toBe(1);
  });

  it('counts a table and its compressed copy once', async () => {
    const { engine } = await night(['v.csv', frame('V', V)]);
    const copy = await engine.absorb('v.csv.gz', gzipSync(bytes(frame('V', V))));
    expect(copy.kind).toBe('known');
    expect(engine.catalogue.readings[0]).toBe(1);
  });

  it('a re-reduction replaces its earlier frame, and the means follow', async () => {
    const { engine, maker } = await whole();
    expect((await engine.absorb('v.csv', bytes(frame('V', V, 0.2, '05')))).kind).toBe('replaced');
    const { stars } = maker.view(NOW);
    expect(stars.mag[0]).toBeCloseTo(10.0, 3);
    expect(stars.readings[0]).toBe(2);
  });

  it('a latest.csv beside numbered copies keeps all frames', async () => {
    const [one, two] = [frame('V', V), frame('V', V, 0.1, '10')];
    const { outcomes, view } = await night(
      ['latest.csv', one],
      ['v1.csv', one],
      ['latest.csv', two],
      ['v2.csv', two],
    );
    expect(outcomes.map(({ kind }) => kind)).toEqual(['read', 'known', 'read', 'known']);
    expect(view.frames).toHaveLength(2);
    expect(view.stars.mag[0]).toBeCloseTo(9.85, 3);
  });

  it('a file that becomes a copy of another takes its own frame away', async () => {
    const [one, two] = [frame('V', V), frame('V', V, 0.1, '10')];
    const { outcomes, view } = await night(['v1.csv', one], ['v2.csv', two], ['v2.csv', one]);
    expect(outcomes.at(-1)?.kind).toBe('known');
    expect(view.frames.map(({ name }) => name)).toEqual(['v1.csv']);
    expect(view.stars.mag[0]).toBeCloseTo(9.8, 3);
  });

  it('a file written anew takes its old problems away, a copy does not repeat them', async () => {
    const half = `${frame('V', V)}30.3,45`;
    const { engine } = await night(['v.csv', half], ['copy.csv', half]);
    expect(engine.problems.map(({ code, file }) => [code, file])).toEqual([['row-width', 'v.csv']]);
    await engine.absorb('v.csv', bytes(frame('V', V, 0, '01')));
    expect(engine.problems).toEqual([]);
  });

  it('a rewrite that cannot be read leaves the good frame, until it can', async () => {
    const { engine } = await night(['v.csv', frame('V', V)], ['v.csv', 'rubbish']);
    expect(engine.frames).toHaveLength(1);
    expect(engine.problems).toHaveLength(1);
    await engine.absorb('v.csv', bytes(frame('V', V)));
    expect(engine.problems).toEqual([]);
  });

  it('a night read at once gives what it gives file by file; files of one name in two folders are two', async () => {
    const files = [
      { name: 'a.csv', place: '/a/a.csv', bytes: bytes(ASTROMETRY) },
      { name: 'v.csv', place: '/a/v.csv', bytes: bytes(frame('V', V, 0, '05')) },
      { name: 'v.csv', place: '/b/v.csv', bytes: bytes(frame('B', B)) },
    ];
    const engine = new NightEngine(profile!);
    const outcomes = await engine.absorbAll(
      (async function* () {
        yield* files;
      })(),
    );
    expect(outcomes.map(({ kind }) => kind)).toEqual(['read', 'read', 'read']);
    const all = new ViewMaker(engine, new FollowUpDesk(engine)).view(NOW);
    expect(all.stars.absMag).toEqual((await whole()).view.stars.absMag);
    expect(all.shortlist.map(({ id }) => id)).toEqual(['dwarf']);
  });

  it('a refused file costs nothing else', async () => {
    const { engine, maker, view } = await whole();
    const outcome = await engine.absorb('bad.csv', bytes('\u0000\u0001rubbish'));
    expect(outcome.kind).toBe('refused');
    expect(outcome.problems).toHaveLength(1);
    expect(maker.view(NOW).shortlist).toEqual(view.shortlist);
  });

  it('without a colour nothing is flagged, and the caution says what is missing', async () => {
    const { engine, view } = await night(['a.csv', ASTROMETRY], ['v.csv', frame('V', V)]);
    expect(view.shortlist).toEqual([]);
    expect(engine.flags.of(1)?.cautions.join()).toMatch(/no B-V yet/);
  });

  it('a star in detail has everything, and its distance is that of its parallax', async () => {
    const { maker } = await whole();
    const detail = maker.detail(1, NOW);
    expect(detail.luminosityClass).toBe('WD');
    expect(detail.mags.map(({ band }) => band)).toEqual(['B', 'V']);
    expect(detail.distance_pc).toBeCloseTo(50, 0);
    expect(detail.exposures.map(({ setup }) => setup)).toEqual(['V imaging', 'low-res spectrum']);
    expect(detail.window.startBy_ms).toBeGreaterThan(NOW);
    expect(detail.lightCurves).toHaveLength(2);
  });

  it('low in the west a spectrum is told the angle of its slit, within the precession since J2000', async () => {
    const { maker } = await whole();
    const caution = (time_ms: number) => maker.detail(0, time_ms).exposures[1].caution;
    expect(caution(NOW)).toBe('');
    const late = Date.parse('2026-11-09T02:30:00Z');
    // Sidereal time: Meeus 1998, eq. 12.4; the angle: eq. 14.1.
    const sidereal_deg = 280.46062 + 360.98564737 * (late / 86_400_000 + 2_440_587.5 - 2_451_545) + 9.3;
    const radian = Math.PI / 180;
    const [hour, dec, phi] = [(sidereal_deg - 30) * radian, 45 * radian, 46.2 * radian];
    const along = Math.tan(phi) * Math.cos(dec) - Math.sin(dec) * Math.cos(hour);
    const expected_deg = Math.atan2(Math.sin(hour), along) / radian;
    const [, airmass, angle] = /at airmass ([\d.]+) set it to (\d+) deg/.exec(caution(late)) ?? [];
    expect(Number(airmass)).toBeGreaterThan(1.3);
    expect(Math.abs(Number(angle) - expected_deg)).toBeLessThan(1.5);
  });

  it('exposures follow the seeing of the newest frames', async () => {
    const good = await whole();
    const poor = await night(
      ['a.csv', ASTROMETRY],
      ['b.csv', frame('B', B)],
      ['v.csv', frame('V', V, 0, '05').replace('FWHM = 2.0', 'FWHM = 5.0')],
    );
    const time = (view: typeof good.view) => view.shortlist[0].exposures[1].total_s;
    expect(time(poor.view)).toBeGreaterThan(time(good.view));
  });
});
