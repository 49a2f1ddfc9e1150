import { Lucia, TimeSpan } from 'lucia';
import { sessionAdapter } from '#db/session-adapter.server.ts';
import { env } from '#app/env.server.ts';

/** The only file that speaks to lucia: replacing it touches nothing else. */
const lucia = new Lucia(sessionAdapter, {
  sessionExpiresIn: new TimeSpan(30, 'd'),
  sessionCookie: {
    name: 'scorchline_session',
    expires: true,
    attributes: { secure: env.SESSION_COOKIE_SECURE, sameSite: 'lax', path: '/' },
  },
});

declare module 'lucia' {
  interface Register {
    Lucia: typeof lucia;
  }
}

/** Opens a session and returns the cookie to set. */
export async function openSession(userId: string): Promise<string> {
  const session = await lucia.createSession(userId, {});
  return lucia.createSessionCookie(session.id).serialize();
}

export interface SessionCheck {
  readonly userId: string | null;
  readonly sessionId: string | null;
  /** Cookie to set, when the session was renewed or has ended. */
  readonly setCookie: string | null;
}

export async function checkSession(request: Request): Promise<SessionCheck> {
  const sessionId = lucia.readSessionCookie(request.headers.get('Cookie') ?? '');
  if (!sessionId) return { userId: null, sessionId: null, setCookie: null };
  const { session, user } = await lucia.validateSession(sessionId);
  if (!session) return { userId: null, sessionId: null, setCookie: lucia.createBlankSessionCookie().serialize() };
  return {
    userId: user.id,
    sessionId: session.id,
    setCookie: session.fresh ? lucia.createSessionCookie(session.id).serialize() : null,
  };
}

/** Ends one session and returns the cookie that clears it. */
export async function closeSession(sessionId: string): Promise<string> {
  await lucia.invalidateSession(sessionId);
  return lucia.createBlankSessionCookie().serialize();
}

/** Ends every session of the person, on every device. */
export async function closeEverySession(userId: string): Promise<string> {
  await lucia.invalidateUserSessions(userId);
  return lucia.createBlankSessionCookie().serialize();
}
