import { createServer, connect } from 'node:net';
import { setTimeout as delay } from 'node:timers/promises';
import { SetupProblem } from './problem.mjs';

/** True when a program could listen on this port of the loopback address now. */
export function isPortFree(port, host = '127.0.0.1') {
  return new Promise((resolve) => {
    const server = createServer();
    server.once('error', () => resolve(false));
    server.listen({ port, host, exclusive: true }, () => server.close(() => resolve(true)));
  });
}

/** A port nobody listens on at the moment; the caller takes it at once. */
export function freePort() {
  return new Promise((resolve, reject) => {
    const server = createServer();
    server.once('error', reject);
    server.listen(0, '127.0.0.1', () => {
      const { port } = server.address();
      server.close(() => resolve(port));
    });
  });
}

/** Refuses with one sentence when the port is taken. @param {string} variable Setting that moves the service elsewhere. */
export async function requirePort(port, purpose, variable, host) {
  if (await isPortFree(port, host)) return;
  throw new SetupProblem(
    `Port ${port}, wanted for ${purpose}, is in use by another program: stop that program, or choose another port with ${variable}=<port>.`,
  );
}

/**
 * Waits until something accepts connections on the port.
 *
 * @param {{exited: Promise<number>, recent: string[], shown: boolean, name: string}} service Fails early when this process ends first.
 */
export async function waitForPort(port, service, host = '127.0.0.1', timeoutMs = 60_000) {
  let ended = false;
  service.exited.then(() => {
    ended = true;
  });
  const deadline = Date.now() + timeoutMs;
  while (Date.now() < deadline && !ended) {
    if (await accepts(port, host)) return;
    await delay(50);
  }
  const reason = ended ? 'ended before it was ready' : `did not listen on port ${port} within ${timeoutMs / 1000} s`;
  throw new SetupProblem(`The ${service.name} ${reason}; its last lines are above.`, service.shown ? '' : service.recent.join('\n'));
}

function accepts(port, host) {
  return new Promise((resolve) => {
    const socket = connect({ port, host });
    socket.once('connect', () => {
      socket.destroy();
      resolve(true);
    });
    socket.once('error', () => resolve(false));
  });
}
