import { existsSync, mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { dirname } from 'node:path';
import { setTimeout as delay } from 'node:timers/promises';
import { isAlive } from './processes.mjs';
import { SetupProblem } from './problem.mjs';

/**
 * Notes who runs on this data folder, so that a second start says so instead of failing on a port, and so that what a
 * killed start left behind is ended.
 *
 * @param {string} file @param {string} root Project folder, which the leftovers' command lines must name.
 */
export async function claimRun(file, root, url) {
  const earlier = readRecord(file);
  if (earlier && runsScript(earlier.pid, 'start.mjs')) {
    throw new SetupProblem(`Scorchline runs already (process ${earlier.pid}): open ${earlier.url}, or stop that one first with Ctrl-C where it was started.`);
  }
  const leftovers = (earlier?.children ?? []).filter((pid) => runsScript(pid, root));
  for (const pid of leftovers) process.kill(pid, 'SIGTERM');
  for (let waited = 0; leftovers.some(isAlive) && waited < 100; waited += 1) await delay(100);

  const record = { pid: process.pid, url, children: [] };
  mkdirSync(dirname(file), { recursive: true });
  const write = () => writeFileSync(file, JSON.stringify(record));
  write();
  return {
    addChild: (pid) => {
      record.children.push(pid);
      write();
    },
    release: () => rmSync(file, { force: true }),
  };
}

function readRecord(file) {
  if (!existsSync(file)) return null;
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch {
    // Cut off by a crash while it was written; it then names nobody.
    return null;
  }
}

/** Process ids are used again, so an id alone proves nothing. */
function runsScript(pid, part) {
  if (!pid || pid === process.pid || !isAlive(pid)) return false;
  try {
    return readFileSync(`/proc/${pid}/cmdline`, 'utf8').includes(part);
  } catch {
    // It ended meanwhile, or it is another user's.
    return false;
  }
}
