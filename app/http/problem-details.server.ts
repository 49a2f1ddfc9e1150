import type { RouterContextProvider } from 'react-router';
import type { Problem } from '#app/domain/api-contract.ts';
import { DomainError } from '#app/domain/errors.ts';
import type { DomainErrorCode } from '#app/domain/errors.ts';
import type { Actor } from '#app/domain/roles.ts';
import type { TokenScope } from '#app/domain/api-token.ts';
import { scopeAllows } from '#app/domain/api-token.ts';
import { canInOrganisation } from '#app/domain/permissions.ts';
import type { InputProblem } from '#app/domain/reconstruction-schema.ts';
import { log } from '#app/log.server.ts';
import { actorContext } from '#app/auth/actor-context.ts';
import { actorByToken, bearerOf } from '#app/auth/api-token.server.ts';
import { limitRate } from '#app/auth/rate-limit.server.ts';

/** Answers of the programming interface: JSON, or problem details after RFC 9457. */

const titles = {
  401: 'Not signed in',
  403: 'Not open to you',
  404: 'Not found',
  405: 'Another method is asked for',
  409: 'Not possible now',
  413: 'Too long',
  415: 'Not JSON',
  422: 'Fields to mend',
  429: 'Too many requests',
  500: 'Failed on our side',
} as const;
type ProblemStatus = keyof typeof titles;

const statusOf: Record<DomainErrorCode, ProblemStatus> = { 'not-found': 404, forbidden: 403, 'invalid-state': 409, conflict: 409, 'invalid-input': 422, 'too-many': 429 };

/** A request that cannot be answered, with what its sender should do. */
export class ProblemError extends Error {
  readonly status: ProblemStatus;
  readonly problems: readonly InputProblem[];
  readonly headers: Readonly<Record<string, string>>;

  constructor(status: ProblemStatus, detail: string, extra: { problems?: readonly InputProblem[]; headers?: Readonly<Record<string, string>> } = {}) {
    super(detail);
    this.name = 'ProblemError';
    this.status = status;
    this.problems = extra.problems ?? [];
    this.headers = extra.headers ?? {};
  }
}

const rateWindowS = 60;

function problemResponse({ status, message, problems, headers }: ProblemError): Response {
  const body: Problem = { type: 'about:blank', title: titles[status], status, detail: message, ...(problems.length > 0 ? { errors: [...problems] } : {}) };
  return new Response(JSON.stringify(body), { status, headers: { 'Content-Type': 'application/problem+json', 'Cache-Control': 'no-store', ...headers } });
}

function asProblem(error: unknown): ProblemError {
  if (error instanceof ProblemError) return error;
  if (error instanceof DomainError) {
    const status = statusOf[error.code];
    return new ProblemError(status, error.message, status === 429 ? { headers: { 'Retry-After': String(rateWindowS) } } : {});
  }
  // The engine's refusals name the field, its value and what is allowed.
  if (error instanceof RangeError) return new ProblemError(422, error.message);
  log.error({ err: error }, 'a request to the programming interface failed');
  return new ProblemError(500, 'Something failed on our side. Nothing was stored; ask again.');
}

/** An answer other than 200, with what its headers say. */
export class JsonAnswer {
  readonly body: unknown;
  readonly status: number;
  readonly headers: Readonly<Record<string, string>>;

  constructor(body: unknown, status: number, headers: Readonly<Record<string, string>> = {}) {
    this.body = body;
    this.status = status;
    this.headers = headers;
  }
}

/** Runs the body of a resource route: its value as JSON, or the problem. */
export async function answerJson(work: () => Promise<unknown>): Promise<Response> {
  try {
    const value = await work();
    const { body, status, headers } = value instanceof JsonAnswer ? value : new JsonAnswer(value, 200);
    return Response.json(body, { status, headers: { 'Cache-Control': 'no-store', ...headers } });
  } catch (error) {
    return problemResponse(asProblem(error));
  }
}

/** What came with a request to the programming interface. */
interface ApiRequest {
  readonly request: Request;
  readonly context: Readonly<RouterContextProvider>;
}

/** Whoever asks: by the key in `Authorization`, else by the session. @throws ProblemError 401 or 403 */
async function identify({ request, context }: ApiRequest, kind: TokenScope): Promise<Actor> {
  if (!request.headers.has('Authorization')) {
    const actor = context.get(actorContext);
    if (actor) return actor;
    throw new ProblemError(401, 'Sign in first, or send a key as “Authorization: Bearer …”. Keys are made on the page “Your account”.', { headers: { 'WWW-Authenticate': 'Bearer realm="Scorchline"' } });
  }
  const token = bearerOf(request);
  const known = token ? await actorByToken(token) : null;
  if (!known) {
    throw new ProblemError(401, 'This key is not known, or it has ended. Make a new one on the page “Your account”.', { headers: { 'WWW-Authenticate': 'Bearer realm="Scorchline", error="invalid_token"' } });
  }
  if (!scopeAllows(known.scope, kind)) {
    throw new ProblemError(403, 'This key may look up sun and sky, but not compute. Make one that may.', { headers: { 'WWW-Authenticate': `Bearer realm="Scorchline", error="insufficient_scope", scope="${kind}"` } });
  }
  return known.actor;
}

/** A person of an operator whose requests are within the limit. Computing is dearer than reading a position. */
export async function requireApiActor(asked: ApiRequest, kind: TokenScope): Promise<Actor> {
  const actor = await identify(asked, kind);
  if (!canInOrganisation(actor, 'register:read')) throw new ProblemError(403, 'Your roles do not include the programming interface. An administrator of your organisation can change that.');
  await limitRate(`api:${kind}:${actor.userId}`, kind === 'read' ? 300 : 30, rateWindowS);
  return actor;
}

/** For the method that an address does not have. */
export const otherMethod = (allowed: 'GET' | 'POST'): Promise<Response> =>
  answerJson(() => Promise.reject(new ProblemError(405, `Use ${allowed}.`, { headers: { Allow: allowed } })));

/** A year of minutes of irradiance fits; anything longer is not an input. */
const longestBodyBytes = 8_000_000;

/** The body as JSON, read no further than the limit. @throws ProblemError 413, 415 or 422 */
export async function readJson(request: Request): Promise<unknown> {
  const type = request.headers.get('Content-Type')?.split(';')[0]?.trim().toLowerCase();
  if (type !== 'application/json') throw new ProblemError(415, 'Send the body as application/json.');
  const text = await readLimited(request);
  try {
    return JSON.parse(text);
  } catch (error) {
    throw new ProblemError(422, `The body is not JSON: ${error instanceof Error ? error.message : 'it cannot be read'}.`);
  }
}

async function readLimited(request: Request): Promise<string> {
  const tooLong = () => new ProblemError(413, `The body is longer than ${longestBodyBytes / 1_000_000} MB. Leave out irradiance outside the window.`);
  if (Number(request.headers.get('Content-Length') ?? 0) > longestBodyBytes) throw tooLong();
  const decoder = new TextDecoder();
  let bytes = 0;
  let text = '';
  const reader = request.body?.getReader();
  for (let part = await reader?.read(); part && !part.done; part = await reader?.read()) {
    bytes += part.value.byteLength;
    if (bytes > longestBodyBytes) {
      await reader?.cancel();
      throw tooLong();
    }
    text += decoder.decode(part.value, { stream: true });
  }
  return text + decoder.decode();
}
