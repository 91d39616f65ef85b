/** False while an island takes over the server's markup, true from then on. */
import { useSyncExternalStore } from 'react';

const never = () => () => undefined;

/** What only the browser knows (a cache shared with an earlier island) must wait for this, or the markup differs. */
export const useHydrated = (): boolean =>
  useSyncExternalStore(
    never,
    () => true,
    () => false,
  );
