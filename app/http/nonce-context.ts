import { createContext } from 'react-router';

/**
 * The random value that this response's own scripts carry; the content security policy runs no others. It is empty only
 * under the framework's bare development server, which sends no such policy.
 */
export const nonceContext = createContext<string>('');
