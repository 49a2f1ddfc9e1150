import { useEffect } from 'react';
import { removeSentDraft } from './draft-store.ts';

/** The team has the report: its draft leaves this device, and its id leaves the address. */
export function ClearSentDraft({ clientId }: { readonly clientId: string }) {
  useEffect(() => {
    removeSentDraft(clientId);
    const address = new URL(window.location.href);
    address.searchParams.delete('report');
    window.history.replaceState(window.history.state, '', address);
  }, [clientId]);
  return null;
}
