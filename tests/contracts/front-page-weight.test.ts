import { readFile } from 'node:fs/promises';
import { gzipSync } from 'node:zlib';
import { build, type Rolldown } from 'vite';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';

/** What a visitor's first page may weigh in JavaScript, gzip, in bytes. */
const limitBytes = 115_000;

/** Packages that come with the pages that need them, never with the first one. */
const notOnTheFirstPage = [
  'zod',
  'react-hook-form',
  '@hookform',
  '@radix-ui',
  'radix-ui',
  'sonner',
  '@tanstack',
];

type Chunk = Rolldown.OutputChunk;
let chunks: Map<string, Chunk>;
let html: string;

/** The chunk and everything it needs before it can run. */
function withImports(fileName: string, seen = new Set<string>()): Set<string> {
  const chunk = chunks.get(fileName);
  if (chunk === undefined || seen.has(fileName)) return seen;
  seen.add(fileName);
  for (const imported of chunk.imports) withImports(imported, seen);
  return seen;
}

beforeAll(async () => {
  // Test runs carry NODE_ENV=test, with which React would come in its development build.
  vi.stubEnv('NODE_ENV', 'production');
  const result = await build({
    mode: 'production',
    logLevel: 'silent',
    build: { write: false, sourcemap: false },
  });
  const { output } = result as Rolldown.RolldownOutput;
  chunks = new Map(
    output.filter((file) => file.type === 'chunk').map((chunk) => [chunk.fileName, chunk]),
  );
  const page = output.find((file) => file.fileName === 'index.html');
  if (page?.type !== 'asset') throw new Error('the build made no index.html');
  html = String(page.source);
}, 60_000);

afterAll(() => {
  vi.unstubAllEnvs();
});

function firstPageScripts(): Chunk[] {
  const named = [...html.matchAll(/(?:src|href)="\/(assets\/[^"]+\.js)"/g)].map(
    ([, fileName = '']) => fileName,
  );
  expect(named.length).toBeGreaterThan(0);
  const all = new Set<string>();
  for (const fileName of named) withImports(fileName, all);
  return [...all].map((fileName) => chunks.get(fileName)).filter((chunk) => chunk !== undefined);
}

describe('the front page of a visitor', () => {
  it(`needs less than ${String(limitBytes)} bytes of JavaScript, gzip`, async () => {
    const scripts = firstPageScripts().map((chunk) => chunk.code);
    scripts.push(await readFile('src/public/theme.js', 'utf8'));
    const bytes = scripts.reduce((sum, code) => sum + gzipSync(code).length, 0);
    console.info(`front page: ${String(bytes)} bytes of JavaScript, gzip`);
    expect(bytes).toBeLessThan(limitBytes);
  });

  it('carries none of what belongs to other pages', () => {
    const modules = firstPageScripts().flatMap((chunk) => Object.keys(chunk.modules));
    for (const name of notOnTheFirstPage)
      expect(modules.filter((module) => module.includes(`/node_modules/${name}/`))).toEqual([]);
  });

  it('has no script inside the page, which the security policy would refuse', () => {
    expect(html.match(/<script(?![^>]*\ssrc=)[^>]*>/g)).toBeNull();
    expect(html).not.toMatch(/\son[a-z]+="/);
  });
});
