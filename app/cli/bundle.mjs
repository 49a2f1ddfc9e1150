/** Bundles what runs beside the web server into one file each: the worker, and the threads it computes in. */
import { readdirSync } from 'node:fs';
import { basename, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';

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
