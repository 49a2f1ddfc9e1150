/**
 * `npm start`: from a fresh checkout to a running application, and back to nothing on Ctrl-C.
 *
 * --dev          the web server reloads what changes
 * --worker-only  one more worker for the configured services, and nothing else
 */
import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { ensureBuild, webEntry, workerEntry } from './provision/build.mjs';
import { chooseDatabaseDir } from './provision/folders.mjs';
import { ensureNodeModules, requireNodeVersion } from './provision/node-modules.mjs';
import { requirePort, waitForPort } from './provision/ports.mjs';
import { reportProblem, SetupProblem } from './provision/problem.mjs';
import { endRunningCommands, onStopRequest, run, startService } from './provision/processes.mjs';
import { claimRun } from './provision/run-record.mjs';
import { readPlan, startServices } from './provision/services.mjs';

const root = fileURLToPath(new URL('../..', import.meta.url)).replace(/\/$/, '');
const development = process.argv.includes('--dev');
const workerOnly = process.argv.includes('--worker-only');
const say = (line) => console.log(`  ${line}`);

/** The S3 library's reminder about later versions of Node.js is for those who choose the versions, not for who starts us. */
const quieted = { LOG_LEVEL: 'warn', AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: 'true' };

/** How to undo each thing done, in the order of doing. @type {{name: string, stop: () => unknown}[]} */
const undo = [];
const onStop = (name, stop) => undo.push({ name, stop });
let stopping = null;

/** Stops what this process started, last started first. */
function stopEverything() {
  stopping ??= (async () => {
    endRunningCommands();
    for (const { name, stop } of undo.reverse()) {
      try {
        await stop();
      } catch (error) {
        console.error(`The ${name} could not be stopped: ${error.message}`);
      }
    }
  })();
  return stopping;
}

onStopRequest(() => {
  if (stopping) return;
  console.log('\n  Stopping');
  void stopEverything().then(() => process.exit(0));
});

async function main() {
  requireNodeVersion();
  if (existsSync(join(root, '.env'))) process.loadEnvFile(join(root, '.env'));
  const mode = development ? 'development' : 'production';
  if (workerOnly) return startWorkerOnly(mode);

  const host = process.env.HOST || '127.0.0.1';
  const port = Number(process.env.PORT || 3000);
  const url = process.env.PUBLIC_URL || `http://localhost:${port}`;
  const plan = readPlan(root, process.env);
  const record = await claimRun(join(plan.dataDir, 'run.json'), root, url);
  onStop('record of this run', record.release);
  await requirePort(port, 'the web server', 'PORT', host);

  await ensureNodeModules(root, say);
  const databaseDir = () => chooseDatabaseDir(join(plan.dataDir, 'pg'), root);
  const services = await startServices({ root, plan, databaseDir, say, onStop });
  for (const { pid } of services.processes) record.addChild(pid);
  const env = { ...quieted, ...process.env, NODE_ENV: mode, HOST: host, PORT: String(port), PUBLIC_URL: url, ...services.env };
  await prepareDatabase(env, services.database);
  if (!development) await ensureBuild(root, say);

  const web = launch('web server', development ? ['app/cli/dev-server.mjs'] : [webEntry], env, record);
  await waitForPort(port, web, host === '0.0.0.0' ? '127.0.0.1' : host);
  const worker = launch('worker', development ? ['--import', 'tsx', 'app/worker.ts'] : [workerEntry], env, record);
  announce(url, plan);
  return watch([web, worker, ...services.processes]);
}

async function startWorkerOnly(mode) {
  await ensureNodeModules(root, say);
  if (!development) await ensureBuild(root, say);
  const env = { ...quieted, ...process.env, NODE_ENV: mode };
  const worker = launch('worker', [workerEntry], env, null);
  say('A worker runs. Ctrl-C stops it.');
  return watch([worker]);
}

function launch(name, args, env, record) {
  const [first, ...rest] = args;
  // The whole path in the command line lets a later start recognise a leftover as ours.
  const absolute = first.startsWith('-') ? args.with(-1, join(root, args.at(-1))) : [join(root, first), ...rest];
  const service = startService({ name, args: absolute, cwd: root, env, onLine: (line) => console.log(`[${name}] ${line}`) });
  onStop(name, service.stop);
  record?.addChild(service.pid);
  return service;
}

/** Brings the tables up to date, and fills a new local database with the demonstration once. */
async function prepareDatabase(env, database) {
  const migrated = await run(process.execPath, ['--import', 'tsx', 'db/migrate.ts'], { cwd: root, env });
  if (migrated.code !== 0) {
    throw new SetupProblem('The database could not be brought up to date: see above; check DATABASE_URL if you have set it.', migrated.output);
  }
  // Accounts with published passwords have no place in a database that somebody configured, unless they ask for them.
  const wanted = database ? !(await database.hasMark()) : env.SEED_DEMO === 'true';
  if (!wanted) return;
  say('Filling in the demonstration (once; about a minute)');
  const seeded = await run(process.execPath, ['--import', 'tsx', 'db/seed.ts'], { cwd: root, env, show: true });
  if (seeded.code !== 0) throw new SetupProblem('The demonstration could not be filled in: see above; starting again continues it.');
  await database?.setMark();
}

function announce(url, plan) {
  console.log(`\n  Scorchline runs at ${url}`);
  if (plan.mail) console.log('  Its e-mail goes nowhere; it can be read in the application.');
  const signIns = demoSignIns(plan);
  if (plan.database && signIns) console.log(`\n${signIns}`);
  console.log('\n  Ctrl-C stops everything.\n');
}

/** Written by whatever filled in the demonstration, since only that knows the people it invented. */
function demoSignIns(plan) {
  const file = [plan.dataDir, join(root, '.data')].map((folder) => join(folder, 'demo-sign-ins.txt')).find((path) => existsSync(path));
  return file ? ['Demonstration sign-ins:', ...readFileSync(file, 'utf8').trimEnd().split('\n')].map((line) => `  ${line}`).join('\n') : '';
}

/** Waits for as long as all parts run. */
async function watch(parts) {
  const ended = await Promise.race(parts.map((part) => part.exited.then((code) => ({ part, code }))));
  if (stopping) return stopping;
  throw new SetupProblem(`The ${ended.part.name} ended unexpectedly (code ${ended.code}), so everything was stopped: see its last lines above, then start again.`);
}

try {
  await main();
} catch (error) {
  if (stopping) {
    await stopping;
  } else {
    const code = reportProblem(error);
    await stopEverything();
    process.exit(code);
  }
}
