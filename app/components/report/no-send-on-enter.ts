import type { KeyboardEvent } from 'react';

/** For fields that stand in the form of the report without belonging to it: Enter ends the typing and sends nothing. */
export function noSendOnEnter(event: KeyboardEvent<HTMLInputElement>): void {
  if (event.key === 'Enter') event.preventDefault();
}
