import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { describe, expect, it } from 'vitest';
import { PROBLEM_CODES } from '../../src/catalogue/problem-codes.js';
import { EXIT } from '../../src/commands/exit-codes.js';
import { FLAG_CODES } from '../../src/follow/flags/index.js';
import { keyLines } from '../../src/screens/keys/key-lines.js';
import { ROOT, run } from '../support/built.js';

const readme = readFileSync(resolve(ROOT, 'README.md'), 'utf8');
const developers = readFileSync(resolve(ROOT, 'DEVELOPERS.md'), 'utf8');
const template = readFileSync(resolve(ROOT, 'profiles/template.toml'), 'utf8');
const manifest = JSON.parse(readFileSync(resolve(ROOT, 'package.json'), 'utf8')) as Record<
  string,
  Record<string, string>
>;

describe('the README tells everything there is', () => {
  it('every key', () => {
    for (const { keys, does } of keyLines()) expect(readme).toContain(`| ${keys} | ${does} |`);
  });

  it('every problem code with its cause', () => {
    for (const [code, { cause, cost }] of Object.entries(PROBLEM_CODES)) {
      expect(readme).toContain(`| \`${code}\` | ${cause} | ${cost} |`);
    }
  });

  it('every flag', () => {
    for (const code of FLAG_CODES) expect(readme).toContain(`\`${code}\``);
  });

  it('every exit code', () => {
    for (const code of Object.values(EXIT)) expect(readme).toMatch(new RegExp(`^\\| ${code} \\|`, 'm'));
  });

  it('every key of a profile', () => {
    const names = [...template.matchAll(/^(?:# )?([a-zA-Z_]+) =/gm)].map(match => match[1]);
    expect(names.length).toBeGreaterThan(50);
    for (const name of new Set(names)) if (name !== 'WD') expect(readme, name).toContain(`\`${name}\``);
  });

  it('every option of every command', async () => {
    for (const command of ['watch', 'classify', 'profile', 'replay']) {
      const { out } = await run([command, '--help']);
      const options = [...out.matchAll(/ (--[a-z]+)/g)]
        .map(match => match[1])
        .filter(option => option !== '--help');
      for (const option of options) expect(readme, `${command} ${option}`).toContain(option);
    }
  });

  it('its first code block is what a newcomer types', () => {
    expect(/```sh\n([\s\S]*?)```/.exec(readme)?.[1]).toMatch(
      /^npm ci && npm run demo .*\nnpm ci && npm test /,
    );
  });
});

describe('DEVELOPERS.md', () => {
  it('gives a reason for every dependency', () => {
    const ignored = (name: string) => name.startsWith('@types/');
    for (const name of Object.keys({ ...manifest.dependencies, ...manifest.devDependencies })) {
      if (!ignored(name))
        expect(developers, name).toMatch(new RegExp(`\\| [^|]*${name.replace('/', '\\/')}[^|]*\\|`));
    }
  });
});
