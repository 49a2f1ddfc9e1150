import { createContext } from 'react-router';

/**
 * Network address that the request came from, as Express sees it (a proxy's header counts only when `TRUST_PROXY` says
 * so). Used to count tries; never stored with a case.
 */
export const clientAddressContext = createContext<string>('unknown');
