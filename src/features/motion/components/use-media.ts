/** Whether a media query holds; on the server, what the browser hinted. */
import { createContext, useCallback, useContext, useSyncExternalStore } from 'react';

/** True where the request came from a phone (Sec-CH-UA-Mobile). */
export const PhoneHint = createContext(false);

export function useMedia(query: string): boolean {
  const hint = useContext(PhoneHint);
  const subscribe = useCallback(
    (listener: () => void) => {
      const media = window.matchMedia(query);
      media.addEventListener('change', listener);
      return () => media.removeEventListener('change', listener);
    },
    [query],
  );
  return useSyncExternalStore(
    subscribe,
    () => window.matchMedia(query).matches,
    () => query === PHONE && hint,
  );
}

export const PHONE = '(max-width: 767px)';
