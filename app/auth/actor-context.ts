import { createContext } from 'react-router';
import type { Actor } from '#app/domain/roles.ts';

/** Who asks, set once per request by the session middleware; null for a guest. */
export const actorContext = createContext<Actor | null>(null);
/** The session that the request came with, for signing out. */
export const sessionIdContext = createContext<string | null>(null);
