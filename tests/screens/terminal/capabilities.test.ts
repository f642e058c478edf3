import { describe, expect, it } from 'vitest';
import {
  chooseLook,
  colourDepth,
  isRemote,
  speaksUnicode,
} from '../../../src/screens/terminal/capabilities.js';

describe('what the terminal can show', () => {
  it.each([
    [{ TERM: 'xterm-256color' }, '256'],
    [{ TERM: 'xterm' }, '16'],
    [{ TERM: 'xterm-256color', COLORTERM: 'truecolor' }, 'true'],
    [{ TERM: 'xterm-256color', NO_COLOR: '1' }, 'none'],
    [{ TERM: 'xterm-256color', NO_COLOR: '' }, '256'],
    [{ TERM: 'linux' }, '16'],
    [{ TERM: 'xterm-direct' }, 'true'],
    [{ TERM: 'dumb' }, 'none'],
    [{ TERM: 'vt100' }, 'none'],
    [{ TERM: 'vt220' }, 'none'],
    [{}, 'none'],
    [{ TERM: 'dumb', FORCE_COLOR: '3' }, 'true'],
    [{ TERM: 'xterm', FORCE_COLOR: '0' }, 'none'],
    [{ TERM: 'vt100', FORCE_COLOR: '1' }, '16'],
    [{ TERM: 'vt100', FORCE_COLOR: '2' }, '256'],
    [{ TERM: 'xterm', FORCE_COLOR: '3', NO_COLOR: '1' }, 'none'],
  ] as const)('colours of %j: %s', (environment, depth) => {
    expect(colourDepth(environment)).toBe(depth);
  });

  it.each([
    [{ LANG: 'en_GB.UTF-8', TERM: 'xterm' }, true],
    [{ LC_ALL: 'C', LANG: 'en_GB.UTF-8', TERM: 'xterm' }, false],
    [{ LC_CTYPE: 'de_DE.utf8', TERM: 'screen' }, true],
    [{ LANG: 'de_DE.ISO-8859-1', TERM: 'xterm' }, false],
    [{ LANG: 'en_GB.UTF-8', TERM: 'linux' }, false],
    [{ LANG: 'en_GB.UTF-8', TERM: 'vt220' }, false],
    [{ LC_ALL: '', LANG: 'en_GB.UTF-8', TERM: 'xterm' }, true],
    [{ TERM: 'xterm' }, false],
  ])('Unicode of %j: %s', (environment, expected) => {
    expect(speaksUnicode(environment)).toBe(expected);
  });

  it('wishes come first', () => {
    expect(chooseLook({ TERM: 'dumb' }, { palette: 'red', glyphs: 'block' })).toEqual({
      palette: 'red',
      glyphs: 'block',
      depth: 'none',
    });
    expect(chooseLook({ TERM: 'dumb' }, {})).toEqual({ palette: 'mono', glyphs: 'ascii', depth: 'none' });
  });

  it('a remote link shows in the environment', () => {
    expect(isRemote({ SSH_CONNECTION: '1.2.3.4 5 6.7.8.9 22' })).toBe(true);
    expect(isRemote({})).toBe(false);
  });
});
