import { execFileSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';

/*
 * Which part of the code may know which other. ESLint says the zones while one writes; this holds
 * them as a whole, the order of the stages and the freedom from circles too.
 */

const root = path.resolve(import.meta.dirname, '../..');

type Import = { from: string; to: string; isType: boolean };

const sources = execFileSync('git', ['ls-files', '--cached', '--others', '--exclude-standard'], {
  cwd: root,
  encoding: 'utf8',
})
  .split('\n')
  .filter((file) => /^(shared|src|server)\/.*\.tsx?$/.test(file))
  .filter((file) => !file.endsWith('.d.ts') && !file.includes('/wasm/assembly/'));

const imports: Import[] = sources.flatMap((from) => {
  const text = readFileSync(path.join(root, from), 'utf8');
  const statements = text.matchAll(
    /(?:^|\n)(?:import|export)\s+(type\s+)?[^;'"]*?from\s+'([^']+)'/g,
  );
  const lazy = text.matchAll(/()\bimport\(\s*'([^']+)'\s*\)/g);
  return [...statements, ...lazy].map(([, type, specifier]) => ({
    from,
    to: resolveImport(from, specifier ?? ''),
    isType: Boolean(type),
  }));
});

function resolveImport(from: string, specifier: string): string {
  if (specifier.startsWith('#shared/')) return specifier.replace('#shared/', 'shared/');
  if (specifier.startsWith('.')) return path.posix.join(path.posix.dirname(from), specifier);
  return specifier;
}

const zoneOf = (file: string): string => file.split('/')[0] ?? '';
const isOurs = ({ to }: Import): boolean => /^(shared|src|server|tests)\//.test(to);

describe('imports', () => {
  it('are found at all', () => {
    expect(imports.length).toBeGreaterThan(500);
    expect(imports.filter(isOurs).length).toBeGreaterThan(300);
  });

  it('never lead from shared to a platform, nor between client and server', () => {
    const allowed: Record<string, string[]> = {
      shared: ['shared'],
      src: ['src', 'shared'],
      server: ['server', 'shared'],
    };
    const wrong = imports
      .filter(isOurs)
      .filter(({ from, to }) => !allowed[zoneOf(from)]?.includes(zoneOf(to)));
    expect(wrong).toEqual([]);
  });

  it('bring only pure libraries into shared', () => {
    const pure = ['zod', 'music-metadata', 'hash-wasm', 'fflate', 'pdf-lib', '@pdf-lib/fontkit'];
    const foreign = imports.filter(
      (one) => zoneOf(one.from) === 'shared' && !isOurs(one) && !pure.includes(one.to),
    );
    expect(foreign).toEqual([]);
  });

  it('keep the components of the interface free of the product', () => {
    const wrong = imports.filter(
      ({ from, to }) => from.startsWith('src/ui/') && /^(shared|src\/(?!ui\/))/.test(to),
    );
    expect(wrong).toEqual([]);
  });

  it('follow the stages in one direction', () => {
    // Not the order of the story at its end: the package holds the report, so it knows it.
    const stages = ['bytes', 'wave', 'measure', 'compare', 'judge', 'repair', 'report', 'pack'];
    const stageOf = (file: string): number =>
      file.startsWith('shared/') ? stages.indexOf(file.split('/')[1] ?? '') : -1;
    const backwards = imports.filter(
      ({ from, to, isType }) => !isType && stageOf(from) >= 0 && stageOf(to) > stageOf(from),
    );
    expect(backwards).toEqual([]);
  });

  it('run in no circle', () => {
    const graph = new Map<string, string[]>();
    // Components of the client may hold each other: a line that stands for many shows each of them.
    const counted = imports.filter(
      (one) => isOurs(one) && !one.isType && zoneOf(one.from) !== 'src',
    );
    for (const { from, to } of counted) graph.set(from, [...(graph.get(from) ?? []), to]);
    const done = new Set<string>();
    const circles: string[][] = [];
    const visit = (file: string, trail: string[]): void => {
      const at = trail.indexOf(file);
      if (at >= 0) circles.push(trail.slice(at));
      if (at >= 0 || done.has(file)) return;
      for (const next of graph.get(file) ?? []) visit(next, [...trail, file]);
      done.add(file);
    };
    for (const file of graph.keys()) visit(file, []);
    expect(circles).toEqual([]);
  });
});

describe('messages between threads', () => {
  it('are sent only by the workers and their bridge', () => {
    const senders = sources.filter((file) =>
      /\.postMessage\(/.test(readFileSync(path.join(root, file), 'utf8')),
    );
    expect(senders.filter((file) => !file.startsWith('src/workers/'))).toEqual([]);
  });
});
