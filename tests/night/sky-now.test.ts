import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { expect, it } from 'vitest';
import { parseProfile } from '../../src/night/profile/parse.js';
import { SkyNow } from '../../src/night/sky-now.js';
import { ROOT } from '../support/built.js';

const text = readFileSync(resolve(ROOT, 'profiles/northern-80cm.toml'), 'utf8');
const { profile } = parseProfile(text, 'northern-80cm.toml');
if (profile === undefined) throw new Error('the profile cannot be read');

const at = (time: string) => Date.parse(`2026-11-08T${time}Z`);

it('keeps the sky of a night, in the morning before noon too, and makes the next one after sunrise', () => {
  const sky = new SkyNow(profile);
  const running = sky.at(at('02:00'));
  expect(sky.at(at('05:00'))).toBe(running);
  const coming = sky.at(at('15:00'));
  expect(coming).not.toBe(running);
  expect(sky.at(at('22:00'))).toBe(coming);
  const morning = new SkyNow(profile);
  expect(morning.at(at('09:00'))).toBe(morning.at(at('09:30')));
});
