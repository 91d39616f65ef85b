/** Whether what is shown may be out of date, and how to say so. */
import { createContext, useContext } from 'react';

/** "Offline. Shown as of 14:02; …"; null while the server is heard. */
export const Stale = createContext<string | null>(null);

export const useStale = (): string | null => useContext(Stale);

const clock = (at: number): string =>
  new Date(at).toLocaleTimeString('en-GB', { hour: '2-digit', minute: '2-digit' });

export const staleWords = (heard_at: number, editable: boolean): string =>
  `Offline. Shown as of ${clock(heard_at)}${editable ? '; edits are kept here and sent later' : ''}.`;
