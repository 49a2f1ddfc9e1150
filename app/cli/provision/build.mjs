import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, readdirSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { run } from './processes.mjs';
import { SetupProblem } from './problem.mjs';

const sources = ['app', 'db', 'public', 'package.json', 'package-lock.json', 'tsconfig.json', 'vite.config.ts', 'react-router.config.ts'];

/** Entry points that `npm start` and `npm test` run. */
export const webEntry = join('build', 'server', 'index.js');
export const workerEntry = join('build', 'worker.mjs');

/**
 * Builds the application unless the last build was made from exactly these sources.
 *
 * @param {string} root Project folder. @param {(line: string) => void} say
 */
export async function ensureBuild(root, say) {
  const hash = sourceHash(root);
  const stamp = join(root, 'build', '.sources');
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === hash && existsSync(join(root, webEntry))) return;
  say('Building');
  rmSync(join(root, 'build'), { recursive: true, force: true });
  const env = { ...process.env, NODE_ENV: 'production', NO_COLOR: '1' };
  const steps = [[join('node_modules', '@react-router', 'dev', 'bin.js'), 'build'], [join('app', 'cli', 'bundle.mjs')]];
  for (const args of steps) {
    const { code, output } = await run(process.execPath, args, { cwd: root, env });
    if (code !== 0) throw new SetupProblem('The application could not be built: see above.', output);
  }
  mkdirSync(join(root, 'build'), { recursive: true });
  writeFileSync(stamp, hash);
}

/** By contents rather than by time, so that a fresh checkout of the same sources counts as the same. */
function sourceHash(root) {
  const hash = createHash('sha256').update(process.version);
  for (const source of sources) addToHash(hash, root, source);
  return hash.digest('hex');
}

function addToHash(hash, root, path) {
  const absolute = join(root, path);
  if (!existsSync(absolute)) return;
  if (statSync(absolute).isDirectory()) {
    for (const name of readdirSync(absolute).sort()) addToHash(hash, root, join(path, name));
  } else {
    hash.update(`${path}\0`).update(readFileSync(absolute));
  }
}
