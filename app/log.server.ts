import { pino } from 'pino';
import { env } from '#app/env.server.ts';

interface LoggedError {
  readonly name: string;
  readonly message: string;
  readonly code?: string;
  readonly stack: readonly string[];
  readonly cause?: LoggedError;
}

/** One line of JSON per event on standard output. Pass a caught error as `err`. */
export const log = pino({
  level: env.LOG_LEVEL,
  base: undefined,
  timestamp: pino.stdTimeFunctions.isoTime,
  serializers: { err: describeError },
});

/**
 * What a log may keep of an error. A failed statement carries the values it was run with, in its message and in fields
 * of its own: names, places, tokens. Only the statement itself and the positions in our code are kept.
 */
export function describeError(error: unknown): LoggedError {
  if (!(error instanceof Error)) return { name: typeof error, message: 'Something that is no error was thrown.', stack: [] };
  const code = 'code' in error && typeof error.code === 'string' ? { code: error.code } : {};
  const cause = error.cause === undefined ? {} : { cause: describeError(error.cause) };
  return { name: error.name, message: withoutValues(error.message), ...code, stack: positions(error.stack), ...cause };
}

function withoutValues(message: string): string {
  const [statement = ''] = message.split(/\nparams:/);
  return statement;
}

/** The lines after the message, which itself may run over several lines. */
function positions(stack: string | undefined): string[] {
  return (stack ?? '')
    .split('\n')
    .filter((line) => /^\s+at /.test(line))
    .map((line) => line.trim());
}
