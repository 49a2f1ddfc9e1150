import { readdirSync, readFileSync } from 'node:fs';
import { dirname, join, posix, relative } from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, test } from 'vitest';

const root = fileURLToPath(new URL('..', import.meta.url));

/** What a fresh checkout holds, besides git's own files and what is generated. */
const topLevel = [
  '.ci', '.config', '.env.example', '.gitignore', '.npmrc',
  'DEVELOPERS.md', 'README.md', 'app', 'db', 'drizzle.config.ts', 'fixtures', 'package-lock.json', 'package.json', 'public',
  'react-router.config.ts', 'tests', 'tsconfig.json', 'vite.config.ts',
];
const generated = ['.git', '.data', '.env', '.react-router', 'build', 'node_modules'];

/**
 * Who may import whom, most specific folder first. `own` names folders and files of this project, `packages` what may
 * come from npm or Node.js: a list, or `any` but those in `never`, where a name that ends in `*` stands for all that begin so.
 */
interface Zone {
  readonly path: string;
  readonly own: readonly string[];
  readonly packages: 'any' | readonly string[];
  readonly never?: readonly string[];
}

const interfaceLibraries = ['react', 'react-*', '@react-router/*', '@conform-to/*', 'express'];
const serverLibraries = ['node:*', 'express', 'helmet', 'pg-boss', 'nodemailer', 'sharp', 'pino', '@aws-sdk/*', '@node-rs/*'];
const storageLibraries = ['@aws-sdk/*', 'nodemailer', 'pg-boss', 'sharp'];

const zones: readonly Zone[] = [
  { path: 'app/physics', own: ['app/physics'], packages: [] },
  { path: 'app/domain', own: ['app/domain', 'app/physics'], packages: ['zod', 'temporal-polyfill'] },
  { path: 'app/components', own: ['app/components', 'app/domain', 'app/physics', 'app/http/nonce-context.ts'], packages: 'any', never: serverLibraries },
  {
    path: 'app/routes',
    own: ['app/routes', 'app/components', 'app/domain', 'app/physics', 'app/auth', 'app/http', 'app/services', 'app/storage', 'app/mail', 'app/jobs/queue.server.ts', 'app/env.server.ts', 'app/log.server.ts', 'db/queries', 'db/client.server.ts'],
    packages: 'any',
    never: storageLibraries,
  },
  {
    path: 'app/services',
    own: ['app/services', 'app/domain', 'app/physics', 'app/jobs/queue.server.ts', 'app/jobs/define-job.ts', 'app/jobs/definitions', 'app/jobs/engine-runner.server.ts', 'app/storage', 'app/mail', 'app/env.server.ts', 'app/log.server.ts', 'app/auth', 'db'],
    packages: 'any',
    never: interfaceLibraries,
  },
  {
    path: 'app/jobs/handlers',
    own: ['app/jobs', 'app/services', 'app/mail', 'app/storage', 'app/domain', 'app/physics', 'app/env.server.ts', 'app/log.server.ts', 'db'],
    packages: 'any',
    never: interfaceLibraries,
  },
  { path: 'app/jobs', own: ['app/jobs', 'app/domain', 'app/physics', 'app/env.server.ts', 'app/log.server.ts', 'db'], packages: 'any', never: interfaceLibraries },
  ...['auth', 'http', 'mail', 'storage'].map((name) => ({
    path: `app/${name}`,
    own: ['app/auth', 'app/http', 'app/mail', 'app/storage', 'app/domain', 'app/env.server.ts', 'app/log.server.ts', 'db/queries', 'db/client.server.ts', 'db/session-adapter.server.ts'],
    packages: 'any' as const,
  })),
  { path: 'db/seed', own: ['app', 'db', 'fixtures'], packages: 'any' },
  { path: 'db', own: ['db', 'app/domain', 'app/physics', 'app/env.server.ts', 'app/log.server.ts'], packages: 'any', never: interfaceLibraries },
];

/** Product files never reach into these; only the seed reads fixtures, and only tests read tests. */
const closedFolders = ['tests', 'fixtures'];

const pureFolders = ['app/physics/', 'app/domain/'];
const readersOfTheEnvironment = ['app/env.server.ts', 'app/cli/'];
const generatedTypes = /(^|\/)\+types\//;

interface SourceFile {
  readonly path: string;
  readonly text: string;
  readonly imports: readonly string[];
}

function listFiles(folder: string): string[] {
  return readdirSync(join(root, folder), { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile() && /\.(ts|tsx|mjs)$/.test(entry.name) && !entry.name.endsWith('.d.ts'))
    .map((entry) => relative(root, join(entry.parentPath, entry.name)))
    .sort();
}

/** Comments are blanked first, since examples in them import things too. */
function importsOf(text: string): string[] {
  const code = text.replace(/\/\*[\s\S]*?\*\//g, '').replace(/^\s*\/\/.*$/gm, '');
  const pattern = /(?:\bfrom\s*|\bimport\s*\(\s*|\bimport\s+)(['"])([^'"\n]+)\1/g;
  return [...code.matchAll(pattern)].flatMap((match) => (match[2] === undefined ? [] : [match[2]]));
}

const files: readonly SourceFile[] = ['app', 'db'].flatMap(listFiles).map((path) => {
  const text = readFileSync(join(root, path), 'utf8');
  return { path, text, imports: importsOf(text) };
});

/** Path inside the project, or null for a package. */
function targetInside(importer: string, specifier: string): string | null {
  if (/^#(app|db|tests|fixtures)\//.test(specifier)) return specifier.slice(1).split('?')[0] ?? null;
  if (specifier.startsWith('.')) return posix.join(dirname(importer), specifier.split('?')[0] ?? '');
  return null;
}

function isUnder(path: string, place: string): boolean {
  return path === place || path.startsWith(`${place}/`);
}

function zoneOf(path: string): Zone | undefined {
  return zones.find((zone) => isUnder(path, zone.path) || path === `${zone.path}.ts`);
}

function packageName(specifier: string): string {
  const parts = specifier.split('/');
  return specifier.startsWith('@') ? parts.slice(0, 2).join('/') : (parts[0] ?? specifier);
}

/** Sentences about imports that the table does not allow. */
function forbiddenImports({ path, imports }: SourceFile): string[] {
  const zone = zoneOf(path);
  if (zone === undefined) return [];
  return imports.flatMap((specifier) => {
    if (generatedTypes.test(specifier)) return [];
    const target = targetInside(path, specifier);
    if (target !== null) return zone.own.some((place) => isUnder(target, place)) ? [] : [`${path} imports ${target}`];
    return mayUse(zone, specifier) ? [] : [`${path} imports the package ${specifier}`];
  });
}

function mayUse({ packages, never = [] }: Zone, specifier: string): boolean {
  if (packages !== 'any') return packages.includes(packageName(specifier));
  return !never.some((name) => (name.endsWith('*') ? specifier.startsWith(name.slice(0, -1)) : packageName(specifier) === name));
}

function filesThat(matches: (file: SourceFile) => boolean): string[] {
  return files.filter(matches).map(({ path }) => path);
}

describe('import directions', () => {
  test.each(zones.map(({ path }) => path))('%s imports only what it may', (place) => {
    const own = files.filter(({ path }) => zoneOf(path)?.path === place);
    expect(own, 'the table names folders that exist').not.toEqual([]);
    expect(own.flatMap(forbiddenImports)).toEqual([]);
  });

  test('product files import neither tests nor, except the seed, fixtures', () => {
    const offenders = files.flatMap(({ path, imports }) =>
      imports.flatMap((specifier) => {
        const target = targetInside(path, specifier);
        const closed = target !== null && closedFolders.some((folder) => isUnder(target, folder));
        return closed && zoneOf(path)?.path !== 'db/seed' ? [`${path} imports ${target}`] : [];
      }),
    );
    expect(offenders).toEqual([]);
  });

  test('drizzle and the PostgreSQL driver are imported only under db', () => {
    const isDriver = (specifier: string) => ['drizzle-orm', 'postgres', 'drizzle-kit'].includes(packageName(specifier));
    expect(filesThat(({ path, imports }) => !path.startsWith('db/') && imports.some(isDriver))).toEqual([]);
  });

  test('lucia stays behind app/auth and its adapter', () => {
    const allowed = (path: string) => path.startsWith('app/auth/') || path === 'db/session-adapter.server.ts';
    const isLucia = (specifier: string) => packageName(specifier) === 'lucia' || specifier.startsWith('@lucia-auth/');
    expect(filesThat(({ path, imports }) => !allowed(path) && imports.some(isLucia))).toEqual([]);
  });

  test('relative imports stay inside one area of the tree', () => {
    const area = (path: string) => path.split('/').slice(0, 2).join('/');
    const leaves = files.flatMap(({ path, imports }) =>
      imports.flatMap((specifier) => {
        const target = specifier.startsWith('.') && !generatedTypes.test(specifier) ? targetInside(path, specifier) : null;
        // Files directly under app or db have no area of their own.
        return target === null || area(target) === area(path) || dirname(target) === dirname(path) ? [] : [`${path} imports ${specifier}`];
      }),
    );
    expect(leaves.filter((line) => !line.startsWith('db/'))).toEqual([]);
  });

  test('imports of our own TypeScript files name their extension', () => {
    const bare = files.flatMap(({ path, imports }) =>
      imports.filter((specifier) => targetInside(path, specifier) !== null && !generatedTypes.test(specifier) && !/\.\w+(\?\w+)?$/.test(specifier)).map((specifier) => `${path} imports ${specifier}`),
    );
    expect(bare).toEqual([]);
  });

  test('what the worker and the command-line entries reach holds no JSX', () => {
    expect(reachableFrom(['app/worker.ts', 'db/seed.ts', 'db/migrate.ts', 'app/cli/reconstruct.ts']).filter((path) => path.endsWith('.tsx'))).toEqual([]);
  });
});

function reachableFrom(entries: readonly string[]): string[] {
  const byPath = new Map(files.map((file) => [file.path, file]));
  const reached = new Set<string>();
  const open = [...entries];
  for (let path = open.pop(); path !== undefined; path = open.pop()) {
    const file = byPath.get(path);
    if (file === undefined || reached.has(path)) continue;
    reached.add(path);
    for (const specifier of file.imports) {
      const target = targetInside(path, specifier);
      if (target !== null) open.push(target);
    }
  }
  return [...reached];
}

describe('pure zones', () => {
  const pure = files.filter(({ path }) => pureFolders.some((folder) => path.startsWith(folder)));

  test('physics and domain exist', () => {
    expect(pure.length).toBeGreaterThan(10);
  });

  test.each([
    ['the clock', /\bDate\.now\b|\bnew Date\(\)|\bperformance\.now\b/],
    ['unseeded randomness', /\bMath\.random\b|\bcrypto\./],
    ['the environment or the console', /\bprocess\.|\bconsole\./],
  ])('physics and domain do not use %s', (_what, pattern) => {
    expect(pure.filter(({ text }) => pattern.test(withoutComments(text))).map(({ path }) => path)).toEqual([]);
  });
});

function withoutComments(text: string): string {
  return text.replace(/\/\*[\s\S]*?\*\//g, '').replace(/\/\/.*$/gm, '');
}

describe('the tree', () => {
  test('the top level holds exactly the agreed entries', () => {
    const present = readdirSync(root).filter((name) => !generated.includes(name));
    expect(present.sort()).toEqual([...topLevel].sort());
  });

  test('only app/env.server.ts and app/cli read the environment', () => {
    const allowed = (path: string) => readersOfTheEnvironment.some((place) => path === place || path.startsWith(place));
    expect(filesThat(({ path, text }) => !allowed(path) && /\bprocess\.env\b/.test(withoutComments(text)))).toEqual([]);
  });

  test('no file is a drawer for anything', () => {
    const drawers = files.filter(({ path }) => /(^|\/)(utils|helpers|misc|common|index)(\.server)?\.tsx?$/.test(path));
    expect(drawers.map(({ path }) => path)).toEqual([]);
  });

  test('file names are kebab-case', () => {
    const odd = files.filter(({ path }) => !/^[a-z0-9]+(-[a-z0-9]+)*(\.[a-z0-9]+)*$/.test(path.split('/').at(-1)?.replace(/^_/, '') ?? ''));
    expect(odd.map(({ path }) => path)).toEqual([]);
  });
});
