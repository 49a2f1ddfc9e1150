/**
 * `npm test`: everything that can be checked, from a fresh checkout, in a scratch database and on free ports.
 *
 * Names of steps as arguments run only these:  npm test -- unit db
 * The last line is always `N passed, N failed`.
 */
import { existsSync, readFileSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { ensureBuild } from './provision/build.mjs';
import { ensureDebianPackages, findChromium } from './provision/debian-packages.mjs';
import { makeScratchDir } from './provision/folders.mjs';
import { ensureNodeModules, requireNodeVersion } from './provision/node-modules.mjs';
import { freePort } from './provision/ports.mjs';
import { reportProblem } from './provision/problem.mjs';
import { endRunningCommands, onStopRequest, run } from './provision/processes.mjs';
import { startServices } from './provision/services.mjs';

const root = fileURLToPath(new URL('../..', import.meta.url)).replace(/\/$/, '');
const modules = join(root, 'node_modules');
const say = (line) => console.log(`  ${line}`);

/** @type {{name: string, stop: () => unknown}[]} */
const undo = [];
let scratch = '';
let interrupted = false;

const tools = {
  typegen: [join(modules, '@react-router', 'dev', 'bin.js'), 'typegen'],
  typescript: [join(modules, 'typescript', 'bin', 'tsc'), '--noEmit'],
  lint: [join(modules, 'eslint', 'bin', 'eslint.js'), '--config', '.config/eslint.config.js', '--max-warnings', '0', '.'],
};

/** Each step tells how many of its tests passed and failed. */
const steps = {
  typecheck: async (env) => allOrNothing((await tool(tools.typegen, env)) && (await tool(tools.typescript, env))),
  lint: async (env) => allOrNothing(await tool(tools.lint, env)),
  architecture: (env) => vitest('architecture', env),
  unit: (env) => vitest('unit', env),
  handbook: (env) => vitest('handbook', env),
  db: (env) => vitest('db', env),
  e2e: async (env) => {
    await ensureBuild(root, say);
    return vitest('e2e', env);
  },
};

/** Stages one after the other. Lanes of a stage run side by side: the linter keeps one core only, and would leave the other idle. */
const stages = [[['lint'], ['typecheck', 'architecture', 'handbook', 'unit']], [['db']], [['e2e']]];

onStopRequest(() => {
  interrupted = true;
  endRunningCommands();
});

const total = { passed: 0, failed: 0 };
try {
  await main(process.argv.slice(2));
} catch (error) {
  reportProblem(error);
  total.failed += 1;
} finally {
  await cleanUp();
}
if (total.passed + total.failed === 0) console.log('No test ran.');
if (interrupted) console.log('Interrupted before the end.');
console.log(`${total.passed} passed, ${total.failed} failed`);
process.exit(total.failed > 0 || total.passed === 0 || interrupted ? 1 : 0);

async function main(wanted) {
  requireNodeVersion();
  const unknown = wanted.filter((name) => !(name in steps));
  if (unknown.length > 0) throw new Error(`No such step: ${unknown.join(', ')}. Steps: ${Object.keys(steps).join(', ')}.`);
  const env = await timed('set-up', provision);
  const asked = (name) => wanted.length === 0 || wanted.includes(name);
  for (const lanes of stages) await Promise.all(lanes.map((lane) => runLane(lane.filter(asked), env)));
}

async function runLane(names, env) {
  for (const name of names) {
    if (interrupted) return;
    await runStep(name, env);
  }
}

async function runStep(name, env) {
  const result = await timed(name, () => countFailures(steps[name], env));
  total.passed += result.passed;
  total.failed += result.failed;
  say(`${name}: ${result.passed} passed, ${result.failed} failed`);
}

async function provision() {
  await ensureNodeModules(root, say);
  await ensureDebianPackages(['postgres', 'chromium'], say);
  scratch = makeScratchDir();
  const service = async () => ({ port: await freePort(), portVariable: 'nothing, and run the tests again' });
  const plan = { dataDir: scratch, database: await service(), s3: await service(), mail: await service() };
  const databaseDir = () => join(scratch, 'pg');
  const onStop = (name, stop) => undo.push({ name, stop });
  const { env, database } = await startServices({ root, plan, databaseDir, durable: false, say, onStop });
  return {
    ...settingsOfTheMachine(),
    ...env,
    CI: 'true',
    TEST_DATABASE_ADMIN_URL: database.adminUrl,
    TEST_CHROMIUM: findChromium(),
    TEST_SCRATCH_DIR: scratch,
  };
}

/** Configuration of a running installation must not reach the tests, nor colour codes their output. */
function settingsOfTheMachine() {
  const kept = ['PATH', 'HOME', 'USER', 'LANG', 'TMPDIR', 'SHELL'];
  const values = Object.fromEntries(kept.flatMap((key) => (process.env[key] ? [[key, process.env[key]]] : [])));
  return { ...values, TZ: 'UTC', NO_COLOR: '1' };
}

async function timed(name, work) {
  const startedAt = performance.now();
  console.log(`\n${name}`);
  const result = await work();
  say(`${name} took ${((performance.now() - startedAt) / 1000).toFixed(1)} s`);
  return result;
}

/** A step that breaks is one failure, and the steps after it still run. */
async function countFailures(step, env) {
  try {
    return await step(env);
  } catch (error) {
    reportProblem(error);
    return { passed: 0, failed: 1 };
  }
}

function allOrNothing(ok) {
  return { passed: ok ? 1 : 0, failed: ok ? 0 : 1 };
}

async function tool(args, env) {
  const { code, output } = await run(process.execPath, args, { cwd: root, env });
  if (code !== 0) console.log(output);
  return code === 0;
}

async function vitest(project, env) {
  const report = join(scratch, `${project}.json`);
  const args = [join(modules, 'vitest', 'vitest.mjs'), 'run', '--project', project, '--reporter=dot', '--reporter=json', `--outputFile.json=${report}`];
  const { code, output } = await run(process.execPath, args, { cwd: root, env });
  const { passed, failed } = existsSync(report) ? readReport(report) : { passed: 0, failed: 1 };
  if (code !== 0 || failed > 0) console.log(output);
  // For example an error outside any test: all tests pass, yet the run has failed.
  return { passed, failed: failed === 0 && code !== 0 ? 1 : failed };
}

/** A file that cannot be loaded has no tests to count; it counts as one that failed. */
function readReport(file) {
  const report = JSON.parse(readFileSync(file, 'utf8'));
  const broken = report.testResults.filter(
    ({ status, assertionResults }) => status === 'failed' && assertionResults.every((test) => test.status !== 'failed'),
  );
  return { passed: report.numPassedTests, failed: report.numFailedTests + broken.length };
}

async function cleanUp() {
  for (const { name, stop } of undo.reverse()) {
    try {
      await stop();
    } catch (error) {
      console.error(`The ${name} could not be stopped: ${error.message}`);
    }
  }
  if (scratch) rmSync(scratch, { recursive: true, force: true });
}
