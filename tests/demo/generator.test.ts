import { readdirSync, readFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { describe, expect, it } from 'vitest';
import { makeDemo } from '../../demo-run/generator/make.js';

const folder = resolve(import.meta.dirname, '../../demo-run');
const made = makeDemo();

describe('the demo night', () => {
  it('is what its generator makes, byte for byte', () => {
    const committed = readdirSync(join(folder, 'night')).map(name => `night/${name}`);
    expect([...made.keys()].filter(name => name.startsWith('night/')).sort()).toEqual(committed.sort());
    for (const [name, content] of made) {
      expect(readFileSync(join(folder, name), 'utf8') === content, name).toBe(true);
    }
  });

  it('says in every table that it is invented', () => {
    for (const [name, content] of made)
      if (name.endsWith('.csv')) expect(content).toMatch(/^# invented data/);
  });

  it('hides what the scenario promises', () => {
    const truth = JSON.parse(made.get('truth.json')!) as { stars: { kind: string }[] };
    const kinds = truth.stars.map(star => star.kind);
    const count = (kind: string) => kinds.filter(name => name.includes(kind)).length;
    expect([
      count('white dwarf'),
      count('hot subdwarf'),
      count('supergiant'),
      count('metal-poor'),
      count('straggler'),
    ]).toEqual([4, 1, 2, 2, 2]);
    expect([count('fades'), count('brightens'), count('with an M dwarf')]).toEqual([1, 1, 1]);
  });
});
