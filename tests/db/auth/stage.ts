import { eq } from 'drizzle-orm';
import { RouterContextProvider } from 'react-router';
import { actorContext } from '#app/auth/actor-context.ts';
import { hashPassword } from '#app/auth/password.server.ts';
import { checkSession } from '#app/auth/session.server.ts';
import { DomainError } from '#app/domain/errors.ts';
import type { Actor } from '#app/domain/roles.ts';
import { clientAddressContext } from '#app/http/client-address.ts';
import { db } from '#db/client.server.ts';
import { logEntries, outbox, users } from '#db/schema/all.ts';

export const goodPassword = 'a lens on the window sill';
export const otherPassword = 'matt coating on a parapet';

let hashed: Promise<string> | undefined;
/** Hash of `goodPassword`, made once. */
export const goodHash = (): Promise<string> => (hashed ??= hashPassword(goodPassword));

export const requestWith = (cookie: string) => new Request('http://scorchline.test/cases', { headers: { Cookie: cookie.split(';')[0] ?? '' } });
/** Whose session a cookie opens; null when it opens none. */
export const holderOf = async (setCookie: string): Promise<string | null> => (await checkSession(requestWith(setCookie))).userId;

/** The refusal of a piece of work; fails the test when it is not refused. */
export async function refusal(work: Promise<unknown>): Promise<DomainError> {
  const thrown = await work.then(() => null, (error: unknown) => error);
  if (!(thrown instanceof DomainError)) throw new Error('The work was not refused.', { cause: thrown });
  return thrown;
}

export const userOf = async (email: string) => (await db.select().from(users).where(eq(users.email, email)))[0];
export const lettersTo = (address: string) => db.select().from(outbox).where(eq(outbox.toAddress, address)).orderBy(outbox.createdAt);
export const eventsAbout = async (subjectId: string) => (await db.select({ event: logEntries.event }).from(logEntries).where(eq(logEntries.subjectId, subjectId)).orderBy(logEntries.sequence)).map((line) => line.event);

/** The one-time word in the newest letter to an address. */
export async function wordInLetter(address: string): Promise<string> {
  const letter = (await lettersTo(address)).at(-1);
  const word = /\/(?:invitation|new-password)\/([\w-]+)/u.exec(letter?.bodyText ?? '')?.[1];
  if (!word) throw new Error(`No letter to ${address} holds a link.`);
  return word;
}

export function contextFor(actor: Actor | null, address = '192.0.2.1'): RouterContextProvider {
  const context = new RouterContextProvider();
  context.set(actorContext, actor);
  context.set(clientAddressContext, address);
  return context;
}

export interface Answer {
  readonly status: number;
  readonly location: string;
  readonly setCookie: string;
  readonly body: Record<string, unknown>;
}

/** A redirect, a refusal or a page, in one shape. */
export async function settled(work: unknown): Promise<Answer> {
  const answer: unknown = await Promise.resolve(work).catch((thrown: unknown) => thrown);
  if (answer instanceof Error) throw answer;
  if (answer instanceof Response) return { status: answer.status, location: answer.headers.get('Location') ?? '', setCookie: answer.headers.get('Set-Cookie') ?? '', body: {} };
  const wrapped = Object(answer) as { data?: Record<string, unknown>; init?: ResponseInit | null } & Record<string, unknown>;
  const headers = new Headers(wrapped.init?.headers);
  return { status: wrapped.init?.status ?? 200, location: '', setCookie: headers.get('Set-Cookie') ?? '', body: wrapped.data ?? wrapped };
}

/** A form as a browser without a script posts it. */
export function posted(url: string, typed: Readonly<Record<string, string>>): Request {
  const form = new FormData();
  for (const [name, value] of Object.entries(typed)) form.append(name, value);
  return new Request(`http://scorchline.test${url}`, { method: 'POST', body: form });
}
