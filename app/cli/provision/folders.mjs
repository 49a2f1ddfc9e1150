import { createHash } from 'node:crypto';
import { spawnSync } from 'node:child_process';
import { chmodSync, existsSync, mkdirSync, mkdtempSync, statSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { serverAccount } from './postgres.mjs';
import { SetupProblem } from './problem.mjs';

/**
 * Where the database of this project lives: `preferred`, or a folder under /var/tmp when the account that runs the
 * server may not pass through the folders above (for instance a project under /root).
 */
export function chooseDatabaseDir(preferred, projectRoot) {
  if (process.getuid?.() !== 0) return preferred;
  const key = createHash('sha256').update(projectRoot).digest('hex').slice(0, 12);
  const fallback = join(`/var/tmp/scorchline-${key}`, 'pg');
  const hasPreferred = existsSync(join(preferred, 'PG_VERSION'));
  // Once data is in the fallback it stays there, even if the project folder becomes readable later.
  if (existsSync(join(fallback, 'PG_VERSION')) && !hasPreferred) return owned(fallback);
  const parent = dirname(preferred);
  mkdirSync(parent, { recursive: true });
  chmodSync(parent, 0o711);
  return mayPass(parent, serverAccount(preferred)) ? preferred : owned(fallback);
}

/** A new folder for one run, in which a database can live whoever we are. */
export function makeScratchDir() {
  for (const base of [tmpdir(), '/var/tmp', '/tmp']) {
    if (!existsSync(base)) continue;
    const folder = mkdtempSync(join(base, 'scorchline-'));
    chmodSync(folder, 0o711);
    if (process.getuid?.() !== 0 || mayPass(folder, serverAccount(join(folder, 'pg')))) return folder;
  }
  throw new SetupProblem('No temporary folder can be entered by the user "postgres": set TMPDIR to a folder that every user may pass through.');
}

/** The folder's name can be guessed, so another user could have made it first. */
function owned(folder) {
  const parent = dirname(folder);
  mkdirSync(parent, { recursive: true, mode: 0o711 });
  if (statSync(parent).uid === 0) return folder;
  throw new SetupProblem(`The folder ${parent} belongs to another user: remove it, or set LOCAL_DATA_DIR to a folder that every user may pass through.`);
}

function mayPass(folder, account) {
  return spawnSync('test', ['-x', folder], { ...account, cwd: '/' }).status === 0;
}
