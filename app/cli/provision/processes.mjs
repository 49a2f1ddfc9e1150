import { spawn } from 'node:child_process';

/** Commands that run at the moment, for the case that we are told to stop meanwhile. */
const running = new Set();

/** Ends the commands started by `run` that have not finished. */
export function endRunningCommands() {
  for (const child of running) child.kill('SIGTERM');
}

/**
 * Runs a command to its end.
 *
 * @param {string} command
 * @param {readonly string[]} args
 * @param {{cwd?: string, env?: NodeJS.ProcessEnv, uid?: number, gid?: number, show?: boolean}} [options]
 *   `show` passes the output through instead of collecting it.
 * @returns {Promise<{code: number, stdout: string, output: string}>} `code` is 127 when the command does not exist.
 */
export function run(command, args, options = {}) {
  const { show = false, ...spawnOptions } = options;
  return new Promise((resolve) => {
    const child = spawn(command, args, {
      ...spawnOptions,
      stdio: show ? ['ignore', 'inherit', 'inherit'] : ['ignore', 'pipe', 'pipe'],
    });
    running.add(child);
    let stdout = '';
    let output = '';
    child.stdout?.setEncoding('utf8').on('data', (text) => {
      stdout += text;
      output += text;
    });
    child.stderr?.setEncoding('utf8').on('data', (text) => {
      output += text;
    });
    child.once('error', (error) => resolve({ code: 127, stdout, output: `${output}${error.message}` }));
    child.once('close', (code) => {
      running.delete(child);
      resolve({ code: code ?? 1, stdout, output });
    });
  });
}

/**
 * Calls `stop` when we are told to stop, or when npm is: npm passes a signal only to the shell between itself and us,
 * which ends without passing it on.
 */
export function onStopRequest(stop) {
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, stop);
  if (!process.env.npm_lifecycle_event) return;
  const parent = process.ppid;
  const timer = setInterval(() => {
    if (process.ppid === parent) return;
    clearInterval(timer);
    stop();
  }, 300);
  timer.unref();
  // Whoever read our output may be gone by then.
  for (const stream of [process.stdout, process.stderr]) stream.on('error', () => undefined);
}

/** True while a process with this id exists. */
export function isAlive(pid) {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return error.code === 'EPERM';
  }
}

/**
 * Starts a long-lived Node.js process in its own process group, so that Ctrl-C in a terminal reaches only its owner,
 * which then stops everything in order.
 *
 * @param {{name: string, args: readonly string[], cwd: string, env: NodeJS.ProcessEnv, onLine?: (line: string) => void}} options
 */
export function startService({ name, args, cwd, env, onLine }) {
  const child = spawn(process.execPath, args, { cwd, env, detached: true, stdio: ['ignore', 'pipe', 'pipe'] });
  const recent = [];
  const take = (line) => {
    recent.push(line);
    if (recent.length > 40) recent.shift();
    onLine?.(line);
  };
  for (const stream of [child.stdout, child.stderr]) eachLine(stream, take);
  const exited = new Promise((resolve) => {
    child.once('error', (error) => {
      take(error.message);
      resolve(127);
    });
    child.once('close', (code) => resolve(code ?? 1));
  });
  return { name, pid: child.pid, exited, recent, shown: onLine !== undefined, stop: (graceMs = 10_000) => stopChild(child, exited, graceMs) };
}

async function stopChild(child, exited, graceMs) {
  if (child.exitCode !== null || child.signalCode !== null) return;
  child.kill('SIGTERM');
  const timer = setTimeout(() => child.kill('SIGKILL'), graceMs);
  await exited;
  clearTimeout(timer);
}

function eachLine(stream, take) {
  let rest = '';
  stream.setEncoding('utf8').on('data', (text) => {
    const lines = (rest + text).split('\n');
    rest = lines.pop() ?? '';
    for (const line of lines) take(line);
  });
  stream.on('end', () => {
    if (rest) take(rest);
  });
}
