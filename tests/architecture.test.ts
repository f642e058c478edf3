import { readdirSync, readFileSync } from 'node:fs';
import { dirname, join, relative, resolve } from 'node:path';
import { describe, expect, it } from 'vitest';

/** The floors from the top down: a file may import from its own floor and from those below it. */
const FLOORS = ['main.ts', 'commands', 'screens', 'night', 'follow', 'catalogue', 'science', 'tables'];

const root = resolve(import.meta.dirname, '..', 'src');
const files = readdirSync(root, { recursive: true, encoding: 'utf8' })
  .filter(name => /\.tsx?$/.test(name) && !name.endsWith('.d.ts'))
  .map(name => name.replaceAll('\\', '/'));

function floorOf(file: string): number {
  return FLOORS.indexOf(file.split('/')[0]);
}

/** Everything a file imports, statically or late. */
function importsOf(file: string): string[] {
  const text = readFileSync(join(root, file), 'utf8');
  const found = text.matchAll(/(?:\bfrom\s*|\bimport\s*\(?\s*|\bnew URL\(\s*)['"]([^'"]+)['"]/g);
  return [...found].map(match => match[1]);
}

function isOurs(specifier: string): boolean {
  return specifier.startsWith('.');
}

describe('the floors of src', () => {
  it('finds the sources', () => expect(files.length).toBeGreaterThan(30));

  it('every file stands on a floor', () => {
    expect(files.filter(file => floorOf(file) < 0)).toEqual([]);
  });

  it('imports point down only', () => {
    const upward = files.flatMap(file =>
      importsOf(file)
        .filter(isOurs)
        .map(specifier => relative(root, resolve(root, dirname(file), specifier)).replaceAll('\\', '/'))
        // The program's name and version stand above all floors.
        .filter(target => target !== '../package.json' && floorOf(target) < floorOf(file))
        .map(target => `${file} -> ${target}`),
    );
    expect(upward).toEqual([]);
  });

  it('science imports nothing but itself and the tables', () => {
    const foreign = files
      .filter(file => file.startsWith('science/'))
      .flatMap(file =>
        importsOf(file)
          .filter(specifier => !isOurs(specifier))
          .map(specifier => `${file} -> ${specifier}`),
      );
    expect(foreign).toEqual([]);
  });

  it('react and ink are known to the screens alone', () => {
    const drawing = files.filter(
      file =>
        !file.startsWith('screens/') &&
        importsOf(file).some(specifier => /^(react|ink|ink-table)(\/|$)/.test(specifier)),
    );
    expect(drawing).toEqual([]);
  });

  it('the disk is touched by night and commands, and by the one owner of the terminal', () => {
    const touching = files.filter(
      file =>
        importsOf(file).some(specifier => /^(node:)?fs(\/|$)/.test(specifier)) &&
        !/^(night|commands)\//.test(file) &&
        !['main.ts', 'screens/terminal/session.ts'].includes(file),
    );
    expect(touching).toEqual([]);
  });

  it('has no cycles', () => {
    const graph = new Map(
      files.map(file => [
        file,
        importsOf(file)
          .filter(isOurs)
          .map(specifier => relative(root, resolve(root, dirname(file), specifier)).replace(/\.js$/, ''))
          .flatMap(target => files.filter(candidate => candidate.replace(/\.tsx?$/, '') === target)),
      ]),
    );
    const done = new Set<string>();
    const cycles: string[] = [];
    const visit = (file: string, path: readonly string[]) => {
      if (path.includes(file)) {
        cycles.push([...path.slice(path.indexOf(file)), file].join(' -> '));
        return;
      }
      if (done.has(file)) return;
      for (const next of graph.get(file) ?? []) visit(next, [...path, file]);
      done.add(file);
    };
    for (const file of files) visit(file, []);
    expect(cycles).toEqual([]);
  });
});
