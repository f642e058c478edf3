import { readdirSync, readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { describe, expect, it } from 'vitest';
import { DEFAULT_FLAGS } from '../../../src/follow/flags/index.js';
import { loadProfile, ProfileError, readyProfiles } from '../../../src/night/profile/load.js';
import { parseProfile } from '../../../src/night/profile/parse.js';

const folder = resolve(import.meta.dirname, '../../../profiles');
const template = readFileSync(resolve(folder, 'template.toml'), 'utf8');

const messages = (text: string) => parseProfile(text, 'mine.toml').problems.map(problem => problem.text);
const changed = (from: string, to: string) => messages(template.replace(from, to));

describe('the shipped profiles', () => {
  it.each(readdirSync(folder).filter(name => name.endsWith('.toml')))('%s is complete', name => {
    expect(messages(readFileSync(resolve(folder, name), 'utf8'))).toEqual([]);
  });

  it('are listed without the template', () => {
    expect(readyProfiles(folder)).toEqual(['demo', 'northern-80cm', 'southern-2m']);
  });

  it('the template states the defaults truly', () => {
    const { profile } = parseProfile(template, 'template.toml');
    expect(profile?.flags).toEqual(DEFAULT_FLAGS);
    const without = template
      .split('\n')
      .filter(line => !/#\s*default/.test(line) || /default (1|0|0\.1|0\.05|10800|none|"field")/.test(line))
      .join('\n');
    const bare = parseProfile(without, 'template.toml').profile;
    expect(bare?.site).toEqual(profile?.site);
    expect(bare?.input.matchRadius_arcsec).toBe(profile?.input.matchRadius_arcsec);
  });
});

describe('what is wrong is told with file, line, key, what was seen and what was expected', () => {
  it.each([
    [
      'latitude_deg = 40.0',
      'latitude_deg = 140.0',
      /^mine\.toml:9: site\.latitude_deg: saw 140, expected at most 90$/,
    ],
    [
      'latitude_deg = 40.0',
      'latitude_deg = "north"',
      /^mine\.toml:9: site\.latitude_deg: saw "north", expected a number$/,
    ],
    ['latitude_deg = 40.0', '', /^mine\.toml:7: site\.latitude_deg: missing, expected a number$/],
    ['height_m = 800', 'hieght_m = 800', /site\.hieght_m: unknown key; did you mean 'height_m'\?/],
    ['aperture_m = 0.8', 'aperture_m = 0', /telescope\.aperture_m: saw 0, expected at least 0\.05/],
    ['band = "B"  ', 'band = "R"  ', /band\.#1\.band: saw "R", expected one of U, B, V, Rc, Ic/],
    [
      'band = "V"                     # one',
      'band = "Ic"                     # one',
      /setup\.#1\.band: saw "Ic", expected one of the bands described in \[\[band\]\]: B, V/,
    ],
    [
      'kind = "imager"',
      'kind = "camera"',
      /setup\.#1\.kind: saw "camera", expected kind = 'imager' or 'spectrograph'/,
    ],
    ['modulus_mag = 9.4 ', '# ', /field\.modulus_mag: missing, expected a distance modulus/],
    ['white-dwarf = {', 'white-dwarves = {', /flags\.white-dwarves: unknown key; did you mean 'white-dwarf'/],
    [
      'time_zone = "UTC"',
      'time_zone = "Mars/Olympus"',
      /site\.time_zone: saw "Mars\/Olympus", expected an IANA time zone/,
    ],
    [
      '# ra = "ALPHA_SKY"',
      '"mag.R" = "R"',
      /mine\.toml:\d+: columns\.mag\.R: saw "R", expected a meaning such as ra, dec/,
    ],
    [
      'horizon = []',
      'horizon = [[0, 20], [90, 95]]',
      /mine\.toml:\d+: site\.horizon\.#2\.#2: saw 95, expected at most 89$/,
    ],
    [
      'horizon = []',
      'horizon = [[90, 20], [40, 30]]',
      /site\.horizon: saw \[\[90,20\],\[40,30\]\], expected corners \[azimuth, altitude\] in order of azimuth/,
    ],
    [
      'horizon = []',
      'horizon = [0, 20]',
      /site\.horizon\.#1: saw 0, expected a pair \(\[azimuth, altitude\]\)/,
    ],
    ['name = "My hill"', 'name = "My hill', /^mine\.toml:8: not TOML/],
  ])('%s -> %s', (from, to, wording) => {
    const told = changed(from, to);
    expect(told.length).toBeGreaterThan(0);
    expect(told.join('\n')).toMatch(wording);
  });

  it('several mistakes are all told at once', () => {
    const broken = template
      .replace('latitude_deg = 40.0', 'latitude_deg = 140')
      .replace('height_m = 800', 'height_m = "x"');
    expect(messages(broken)).toHaveLength(2);
  });
});

describe('loading', () => {
  it('a name that is not there says how to see the ready ones', () => {
    expect(() => loadProfile('nowhere', folder)).toThrow(ProfileError);
    expect(() => loadProfile('nowhere', folder)).toThrow(/no such profile/);
  });

  it('a name cannot climb out of the folder', () => {
    expect(() => loadProfile('../package', folder)).toThrow(ProfileError);
  });

  it('a folder is no profile', () => {
    expect(() => loadProfile(`${folder}/`, folder)).toThrow(/not an ordinary file/);
  });
});
