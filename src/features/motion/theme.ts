/** The theme of this browser: on the document at once, in a cookie for the next page. */
import { useSyncExternalStore } from 'react';

export type Theme = 'light' | 'dark';

export const otherTheme = (theme: Theme): Theme => (theme === 'dark' ? 'light' : 'dark');

const read = (): Theme => (document.documentElement.dataset['theme'] === 'dark' ? 'dark' : 'light');

function watch(listener: () => void): () => void {
  const observer = new MutationObserver(listener);
  observer.observe(document.documentElement, { attributes: true, attributeFilter: ['data-theme'] });
  return () => observer.disconnect();
}

export const useTheme = (): Theme => useSyncExternalStore(watch, read, () => 'light');

const YEAR_S = 365 * 24 * 60 * 60;

export function setTheme(theme: Theme): void {
  document.documentElement.dataset['theme'] = theme;
  document.cookie = `theme=${theme}; path=/; max-age=${YEAR_S}; samesite=lax${location.protocol === 'https:' ? '; secure' : ''}`;
}
