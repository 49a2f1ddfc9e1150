import { chownSync, existsSync, mkdirSync, readFileSync, readdirSync, renameSync, rmSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { findPostgresServers } from './debian-packages.mjs';
import { requirePort } from './ports.mjs';
import { isAlive, run } from './processes.mjs';
import { SetupProblem } from './problem.mjs';

const superuser = 'app';

/**
 * Starts a PostgreSQL server of our own on the loopback address, or finds it running.
 *
 * PostgreSQL refuses to run as root, so as root it runs as the user `postgres`, else as oneself. Unix sockets are off:
 * their path has a length limit which a deeply nested project folder would exceed.
 *
 * @param {{dataDir: string, port: number, portVariable: string, durable?: boolean, say: (line: string) => void}} options
 *   `durable: false` trades safety against power loss for speed, for scratch databases only.
 * @returns {Promise<{port: number, adminUrl: string, urlFor: (database: string) => string, ensureDatabase: (name: string) => Promise<void>, hasMark: () => Promise<boolean>, setMark: () => Promise<void>, wasRunning: boolean, stop: () => Promise<void>}>}
 */
export async function startPostgres({ dataDir, port, portVariable, durable = true, say }) {
  const account = serverAccount(dataDir);
  const server = chooseServer(dataDir, account);
  const tool = (name, args) => run(join(server.bin, name), args, { ...account, cwd: '/', env: toolEnvironment() });
  if (!existsSync(join(dataDir, 'PG_VERSION'))) await createCluster(dataDir, account, tool, say);

  const running = runningServer(dataDir);
  if (!running) await launch({ dataDir, port, portVariable, durable, tool });
  const actualPort = running?.port ?? port;
  const urlFor = (database) => `postgres://${superuser}@127.0.0.1:${actualPort}/${database}`;
  return {
    port: actualPort,
    adminUrl: urlFor('postgres'),
    urlFor,
    wasRunning: running !== null,
    ensureDatabase: (name) => ensureDatabase(name, urlFor('postgres'), tool),
    hasMark: () => hasMark(urlFor('scorchline'), tool),
    setMark: () => setMark(urlFor('scorchline'), tool),
    stop: async () => {
      await tool('pg_ctl', ['-D', dataDir, '-m', 'fast', '-w', '-t', '60', 'stop']);
    },
  };
}

/** User and group of the server process: the owner of an existing cluster, or `postgres` for a new one, when we are root. */
export function serverAccount(dataDir) {
  if (process.getuid?.() !== 0) return {};
  if (existsSync(dataDir)) {
    const { uid, gid } = statSync(dataDir);
    if (uid !== 0) return { uid, gid };
  }
  const line = readFileSync('/etc/passwd', 'utf8').split('\n').find((entry) => entry.startsWith('postgres:'));
  const [, , uid, gid] = line?.split(':') ?? [];
  if (!uid || !gid) {
    throw new SetupProblem('The system user "postgres" is missing: run  apt-get install --reinstall postgresql-common  and then this command again.');
  }
  return { uid: Number(uid), gid: Number(gid) };
}

function chooseServer(dataDir, account) {
  const servers = findPostgresServers();
  const [newest] = servers;
  if (!newest) throw new SetupProblem('No PostgreSQL server was found under /usr/lib/postgresql: install the Debian package postgresql.');
  const version = clusterVersion(dataDir);
  if (version === null) return newest;
  if (account.uid === undefined && statSync(dataDir).uid !== process.getuid?.()) throw foreignFolder(dataDir);
  const match = servers.find((server) => server.version === version);
  if (match) return match;
  throw new SetupProblem(
    `The database folder ${dataDir} was made by PostgreSQL ${version}, but only version ${newest.version} is installed: install postgresql-${version}, or set LOCAL_DATA_DIR to a new folder to start with an empty database.`,
  );
}

function clusterVersion(dataDir) {
  try {
    return readFileSync(join(dataDir, 'PG_VERSION'), 'utf8').trim();
  } catch (error) {
    if (error.code === 'ENOENT') return null;
    throw foreignFolder(dataDir);
  }
}

function foreignFolder(dataDir) {
  return new SetupProblem(
    `The database folder ${dataDir} belongs to another user (it was probably made as root): run this command as that user, or set LOCAL_DATA_DIR to a new folder.`,
  );
}

/** Makes the cluster under another name first, so that an interruption never leaves half of one in place. */
async function createCluster(dataDir, account, tool, say) {
  if (existsSync(dataDir) && readdirSync(dataDir).length > 0) {
    throw new SetupProblem(`The folder ${dataDir} holds files but no PostgreSQL database: move them away, or set LOCAL_DATA_DIR to a new folder.`);
  }
  say(`Creating the local database in ${dataDir}`);
  const unfinished = `${dataDir}.new`;
  rmSync(unfinished, { recursive: true, force: true });
  mkdirSync(unfinished, { recursive: true, mode: 0o700 });
  if (account.uid !== undefined) chownSync(unfinished, account.uid, account.gid);
  const result = await tool('initdb', ['-D', unfinished, '-U', superuser, '--auth=trust', '-E', 'UTF8', '--locale=C.UTF-8']);
  if (result.code !== 0) {
    throw new SetupProblem(`The local database could not be created in ${dataDir}: see above; check that the disk has space and the folder can be written.`, result.output);
  }
  if (existsSync(dataDir)) rmSync(dataDir, { recursive: true });
  renameSync(unfinished, dataDir);
}

/** The server that runs on this folder, by its lock file: process id on line 1, port on line 4. */
function runningServer(dataDir) {
  const file = join(dataDir, 'postmaster.pid');
  if (!existsSync(file)) return null;
  const lines = readFileSync(file, 'utf8').split('\n');
  const pid = Number(lines[0]);
  const port = Number(lines[3]);
  if (!pid || !port || !isAlive(pid) || !isPostgres(pid)) return null;
  return { pid, port };
}

/** After a crash and a reboot another program can own the process id in the lock file. */
function isPostgres(pid) {
  try {
    return readFileSync(`/proc/${pid}/cmdline`, 'utf8').includes('postgres');
  } catch (error) {
    if (error.code === 'ENOENT') return false;
    throw error;
  }
}

async function launch({ dataDir, port, portVariable, durable, tool }) {
  await requirePort(port, 'the local database', portVariable);
  const settings = ['listen_addresses=127.0.0.1', 'unix_socket_directories=', 'max_connections=120', 'timezone=UTC', 'log_timezone=UTC'];
  if (!durable) settings.push('fsync=off', 'synchronous_commit=off', 'full_page_writes=off', 'autovacuum=off');
  const options = [`-p ${port}`, ...settings.map((setting) => `-c ${setting}`)].join(' ');
  const log = join(dataDir, 'server.log');
  const result = await tool('pg_ctl', ['-D', dataDir, '-w', '-t', '120', '-l', log, '-o', options, 'start']);
  if (result.code !== 0) {
    const detail = existsSync(log) ? readFileSync(log, 'utf8') : result.output;
    throw new SetupProblem(`The local database did not start: see above, the whole log is in ${log}.`, detail);
  }
}

async function ensureDatabase(name, adminUrl, tool) {
  const found = await query(tool, adminUrl, `select 1 from pg_database where datname = '${name}'`);
  if (found !== '1') await query(tool, adminUrl, `create database "${name}"`);
}

/** That the demonstration was filled in is written on the database itself, so that it shares the database's fate. */
const mark = 'demonstration filled in';

async function hasMark(url, tool) {
  const sql = "select coalesce(shobj_description(oid, 'pg_database'), '') from pg_database where datname = current_database()";
  return (await query(tool, url, sql)) === mark;
}

async function setMark(url, tool) {
  await query(tool, url, `do $$ begin execute format('comment on database %I is %L', current_database(), '${mark}'); end $$`);
}

async function query(tool, url, sql) {
  const result = await tool('psql', ['-X', '-A', '-t', '-q', '-d', url, '-c', sql]);
  if (result.code !== 0) throw new SetupProblem('The local database refused a command: see above.', result.output);
  return result.stdout.trim();
}

/** PGHOST and the like in the caller's environment must not divert the tools to another server. */
function toolEnvironment() {
  return Object.fromEntries(Object.entries(process.env).filter(([key]) => !key.startsWith('PG')));
}
