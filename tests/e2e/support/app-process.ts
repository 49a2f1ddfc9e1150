import { spawn } from 'node:child_process';
import type { ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { existsSync } from 'node:fs';
import { createServer } from 'node:net';
import { join } from 'node:path';
import { setTimeout as delay } from 'node:timers/promises';
import { fileURLToPath } from 'node:url';

export const projectRoot = fileURLToPath(new URL('../../..', import.meta.url));

/** A process of the built application that a test may stop, kill and start again. */
export interface AppProcess {
  readonly start: () => Promise<void>;
  /** Asks it to finish (SIGTERM). */
  readonly stop: () => Promise<void>;
  /** Ends it at once, as a power cut would (SIGKILL). */
  readonly kill: () => Promise<void>;
  /** Last lines it wrote. */
  readonly output: () => string;
}

/**
 * @param entry Path inside `build/`.
 * @param readyUrl Address that answers 200 once it is ready; without one it counts as ready at once.
 */
export function appProcess(entry: string, env: Readonly<Record<string, string>>, readyUrl?: string): AppProcess {
  const script = join(projectRoot, 'build', entry);
  let child: ChildProcess | null = null;
  let lines: string[] = [];
  const output = () => lines.join('');
  const keep = (text: string) => {
    lines = [...lines.slice(-99), text];
  };
  const end = async (signal: NodeJS.Signals) => {
    const current = child;
    child = null;
    if (current === null || current.exitCode !== null || current.signalCode !== null) return;
    const closed = once(current, 'close');
    current.kill(signal);
    await closed;
  };
  return {
    output,
    start: async () => {
      if (!existsSync(script)) throw new Error(`${script} is missing: run npm run build first.`);
      const started = spawn(process.execPath, [script], { cwd: projectRoot, env: { ...inherited(), ...env }, stdio: ['ignore', 'pipe', 'pipe'] });
      started.stdout.setEncoding('utf8').on('data', keep);
      started.stderr.setEncoding('utf8').on('data', keep);
      child = started;
      if (readyUrl !== undefined) await waitUntilReady(readyUrl, started, output);
    },
    stop: () => end('SIGTERM'),
    kill: () => end('SIGKILL'),
  };
}

async function waitUntilReady(url: string, child: ChildProcess, output: () => string): Promise<void> {
  const deadline = Date.now() + 30_000;
  while (Date.now() < deadline && child.exitCode === null) {
    const response = await fetch(url).catch(() => null); // refused until it listens
    if (response?.ok) return;
    await delay(50);
  }
  throw new Error(`The application did not get ready at ${url}.\n${output()}`);
}

/** A port nobody listens on at the moment. */
export async function freePort(): Promise<number> {
  const server = createServer();
  server.listen(0, '127.0.0.1');
  await once(server, 'listening');
  const address = server.address();
  server.close();
  await once(server, 'close');
  if (address === null || typeof address === 'string') throw new Error('No port was given.');
  return address.port;
}

function inherited(): Record<string, string> {
  return { PATH: process.env.PATH ?? '', HOME: process.env.HOME ?? '', TZ: 'UTC' };
}
