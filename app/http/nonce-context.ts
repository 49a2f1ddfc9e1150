import { createContext } from 'react-router';

/** The random value that this response's own scripts carry; the content security policy runs no others. */
export const nonceContext = createContext<string>();
