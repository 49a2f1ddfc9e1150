import { createHash } from 'node:crypto';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { run } from './processes.mjs';
import { SetupProblem } from './problem.mjs';

/** Refuses any Node.js but the major version the dependencies were chosen for. */
export function requireNodeVersion() {
  const [major, minor] = process.versions.node.split('.').map(Number);
  if (major === 20 && minor >= 19) return;
  throw new SetupProblem(
    `Node.js 20.19 or a later 20.x is needed, this is ${process.versions.node}: install Node.js 20 and run the command again.`,
  );
}

/**
 * Installs the npm packages of the lockfile, unless exactly these are installed already.
 *
 * @param {string} root Project folder. @param {(line: string) => void} say
 */
export async function ensureNodeModules(root, say) {
  const lockHash = createHash('sha256').update(readFileSync(join(root, 'package-lock.json'))).digest('hex');
  const stamp = join(root, 'node_modules', '.scorchline-lock');
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === lockHash) return;
  say('Installing npm packages (npm ci)');
  // NODE_ENV=production in the caller's environment would leave out the build tools.
  const result = await run('npm', ['ci', '--include=dev', '--no-audit', '--no-fund'], { cwd: root, env: process.env });
  if (result.code !== 0) {
    throw new SetupProblem(
      'npm ci failed: see its last lines above; check the connection to the npm registry and the free disk space, then run the command again.',
      result.output,
    );
  }
  writeFileSync(stamp, lockHash);
}
