import { readdirSync, readFileSync } from 'node:fs';
import { dirname, join, relative, resolve } from 'node:path';
import { describe, expect, it } from 'vitest';

/**
 * Imports run one way: engine ← contract ← server ← actions, api, middleware ← pages; engine, contract ← features ← pages;
 * engine, contract ← jobs, scripts; db ← server, scripts. Inside the engine every folder stands on the floors below it.
 */
const root = resolve(import.meta.dirname, '..');

const sources = ['src', 'db', 'scripts'].flatMap((top) =>
  readdirSync(join(root, top), { recursive: true, encoding: 'utf8' })
    .filter((name) => /\.(ts|tsx|astro|mjs)$/.test(name))
    .map((name) => join(top, name)),
);

const aliases = JSON.parse(readFileSync(join(root, 'package.json'), 'utf8')).imports as Record<string, string>;

interface Import {
  readonly target: string;
  readonly typeOnly: boolean;
}

function importsOf(file: string): Import[] {
  const text = readFileSync(join(root, file), 'utf8');
  const found: Import[] = [];
  for (const match of text.matchAll(
    /^\s*(?:import|export)\s+(type\s)?[^'"`;]*?from\s+['"]([^'"]+)['"]|^\s*import\s+['"]([^'"]+)['"]|\bimport\(\s*['"]([^'"]+)['"]\s*\)/gm,
  ))
    found.push({ target: match[2] ?? match[3] ?? match[4]!, typeOnly: match[1] !== undefined });
  return found;
}

/** Project-relative path of an import, or null for a package. */
function resolveImport(file: string, target: string): string | null {
  if (target.startsWith('.')) return relative(root, resolve(root, dirname(file), target));
  for (const [alias, path] of Object.entries(aliases)) {
    const stem = alias.replace('*', '');
    if (target.startsWith(stem)) return join(path.replace('./', '').replace('*', ''), target.slice(stem.length));
  }
  return null;
}

const areas: [string, RegExp][] = [
  ['engine', /^src\/lib\/engine\//],
  ['contract', /^src\/lib\/contract\//],
  ['server', /^src\/lib\/server\//],
  ['jobs', /^src\/jobs\//],
  ['features', /^src\/features\//],
  ['ui', /^src\/(components|layouts|styles)\//],
  ['routes', /^src\/(pages|actions)\/|^src\/middleware\.ts|^src\/env\.d\.ts/],
  ['db', /^db\//],
  ['scripts', /^scripts\//],
];
const areaOf = (path: string): string => areas.find(([, pattern]) => pattern.test(path))?.[0] ?? 'other';

const allowed: Record<string, string[]> = {
  engine: ['engine'],
  contract: ['contract', 'engine'],
  server: ['server', 'contract', 'engine', 'db'],
  jobs: ['jobs', 'contract', 'engine'],
  features: ['features', 'ui', 'contract', 'engine'],
  ui: ['ui', 'contract', 'engine'],
  routes: ['routes', 'ui', 'features', 'server', 'contract', 'engine'],
  db: ['db', 'contract', 'engine'],
  scripts: ['scripts', 'server', 'contract', 'engine', 'db', 'jobs', 'other'],
};

/** Floors of the engine, from the ground. A folder may import itself and lower floors. */
const floors: string[][] = [
  ['errors.ts', 'exact'],
  ['graph'],
  ['lagrangian', 'drawing'],
  ['rules', 'expansion', 'ledger'],
  ['integral'],
  ['renormalisation'],
  ['export'],
  ['answer'],
  ['index.ts'],
];
const floorOf = (path: string): number =>
  floors.findIndex((names) => names.includes(path.replace('src/lib/engine/', '').split('/')[0]!));
const roomOf = (path: string): string => path.replace('src/lib/engine/', '').split('/')[0]!;

describe('layers', () => {
  it('finds the sources and their imports', () => {
    expect(sources.length).toBeGreaterThan(30);
    expect(sources.flatMap(importsOf).length).toBeGreaterThan(60);
  });

  it('lets imports between areas run one way only', () => {
    const wrong = sources.flatMap((file) =>
      importsOf(file)
        .map(({ target }) => resolveImport(file, target))
        .filter((path): path is string => path !== null)
        .filter((path) => !(allowed[areaOf(file)] ?? []).includes(areaOf(path)) && areaOf(path) !== 'other')
        .map((path) => `${file} → ${path}`),
    );
    expect(wrong).toEqual([]);
  });

  it('keeps the engine free of packages, Node and the DOM', () => {
    const wrong = sources
      .filter((file) => areaOf(file) === 'engine')
      .flatMap((file) => importsOf(file).map(({ target }) => ({ file, target, path: resolveImport(file, target) })))
      .filter(({ path }) => path === null || areaOf(path) !== 'engine')
      .map(({ file, target }) => `${file} → ${target}`);
    expect(wrong).toEqual([]);
  });

  it('builds each floor of the engine on lower floors', () => {
    const wrong = sources
      .filter((file) => areaOf(file) === 'engine')
      .flatMap((file) =>
        importsOf(file)
          .map(({ target }) => resolveImport(file, target))
          .filter((path): path is string => path !== null)
          .filter(
            (path) =>
              floorOf(path) > floorOf(file) ||
              (floorOf(path) === floorOf(file) && roomOf(path) !== roomOf(file) && floorOf(file) > 0),
          )
          .map((path) => `${file} → ${path}`),
      );
    expect(wrong).toEqual([]);
  });

  it('keeps the ledger and the enumerator strangers: they share only exact/ and the types of graph/', () => {
    const wrong = sources
      .filter((file) => file.startsWith('src/lib/engine/ledger/'))
      .flatMap((file) => importsOf(file).map((found) => ({ file, ...found, path: resolveImport(file, found.target)! })))
      .filter(({ path, typeOnly }) => {
        const room = roomOf(path);
        if (room === 'ledger' || room === 'exact' || room === 'errors.ts') return false;
        return !(room === 'graph' && typeOnly);
      })
      .map(({ file, path }) => `${file} → ${path}`);
    expect(wrong).toEqual([]);
  });

  it('has no circles of imports', () => {
    const edges = new Map(
      sources.map((file) => [
        file,
        importsOf(file)
          .filter(({ typeOnly }) => !typeOnly)
          .map(({ target }) => resolveImport(file, target))
          .filter((path): path is string => path !== null),
      ]),
    );
    const state = new Map<string, 'open' | 'done'>();
    const circles: string[] = [];
    const visit = (file: string, trail: string[]): void => {
      if (state.get(file) === 'done') return;
      if (state.get(file) === 'open') {
        circles.push([...trail.slice(trail.indexOf(file)), file].join(' → '));
        return;
      }
      state.set(file, 'open');
      for (const next of edges.get(file) ?? []) if (edges.has(next)) visit(next, [...trail, file]);
      state.set(file, 'done');
    };
    for (const file of sources) visit(file, []);
    expect(circles).toEqual([]);
  });
});
