import { existsSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { run } from './processes.mjs';
import { SetupProblem } from './problem.mjs';

const postgresRoot = '/usr/lib/postgresql';

/** Folders with a whole PostgreSQL server in them, newest version first. @returns {{version: string, bin: string}[]} */
export function findPostgresServers() {
  if (!existsSync(postgresRoot)) return [];
  return readdirSync(postgresRoot)
    .map((version) => ({ version, bin: join(postgresRoot, version, 'bin') }))
    .filter(({ bin }) => ['initdb', 'pg_ctl', 'postgres', 'psql'].every((tool) => existsSync(join(bin, tool))))
    .sort((a, b) => Number(b.version) - Number(a.version));
}

/** Path of Debian's Chromium, or null. Without the windows of a whole browser it takes a quarter less time. */
export function findChromium() {
  return ['/usr/bin/chromium-headless-shell', '/usr/bin/chromium', '/usr/bin/chromium-browser'].find((path) => existsSync(path)) ?? null;
}

/** What each part needs, and how to see that it is there. */
export const requirements = {
  postgres: { packages: ['postgresql'], present: () => findPostgresServers().length > 0 },
  chromium: { packages: ['chromium-headless-shell', 'fonts-dejavu-core'], present: () => findChromium() !== null },
};

/**
 * Installs the Debian packages that are missing; asks for nothing.
 *
 * @param {readonly (keyof typeof requirements)[]} names
 * @param {(line: string) => void} say
 * @throws {SetupProblem} With the exact command, when not root or when the installation fails.
 */
export async function ensureDebianPackages(names, say) {
  const missing = names.map((name) => requirements[name]).filter((requirement) => !requirement.present());
  if (missing.length === 0) return;
  const packages = missing.flatMap((requirement) => requirement.packages);
  const install = ['install', '-y', '--no-install-recommends', ...packages];
  const byHand = `apt-get update && apt-get ${install.join(' ')}`;
  if (process.getuid?.() !== 0) {
    throw new SetupProblem(`Missing Debian packages: run  sudo sh -c '${byHand}'  and then this command again.`);
  }
  say(`Installing Debian packages: ${packages.join(' ')}`);
  // A machine's first automatic update may hold the lock for minutes; waiting beats failing.
  const options = ['-o', 'DPkg::Lock::Timeout=300', '-o', 'Acquire::Retries=3'];
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  const update = await run('apt-get', [...options, 'update'], { env });
  const installed = await run('apt-get', [...options, ...install], { env });
  if (installed.code !== 0 || missing.some((requirement) => !requirement.present())) {
    throw new SetupProblem(
      `The Debian packages ${packages.join(' ')} could not be installed: see above, then run  ${byHand}  by hand.`,
      `${update.code === 0 ? '' : update.output}\n${installed.output}`,
    );
  }
}
