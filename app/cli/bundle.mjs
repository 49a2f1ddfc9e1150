/** Bundles what runs beside the web server into one file each: the worker, the threads it computes in, and the service worker. */
import { readdirSync } from 'node:fs';
import { basename, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';
import { filesForReporting } from './precache.mjs';

const root = fileURLToPath(new URL('../..', import.meta.url));
const threads = readdirSync(join(root, 'app'), { recursive: true, encoding: 'utf8' }).filter((path) => path.endsWith('.thread.ts'));
const entries = ['worker.ts', ...threads].map((path) => ({
  in: join(root, 'app', path),
  out: basename(path, '.ts'),
}));

await build({
  entryPoints: entries,
  outdir: join(root, 'build'),
  outExtension: { '.js': '.mjs' },
  bundle: true,
  splitting: false,
  platform: 'node',
  format: 'esm',
  target: 'node20',
  packages: 'external',
  sourcemap: 'linked',
  absWorkingDir: root,
  logLevel: 'warning',
});

// A new build must differ by a byte for browsers to take it, and its name must sort after the one before.
const { files, hash } = filesForReporting(join(root, 'build', 'client'));
await build({
  entryPoints: [join(root, 'app', 'service-worker.ts')],
  outfile: join(root, 'build', 'client', 'service-worker.js'),
  bundle: true,
  platform: 'browser',
  format: 'iife',
  target: 'es2022',
  minify: true,
  define: { precacheList: JSON.stringify(files), buildName: JSON.stringify(`${new Date().toISOString()}-${hash}`) },
  absWorkingDir: root,
  logLevel: 'warning',
});
