/** Copies the link that restores what is seen. */
import { useState } from 'react';
import { toQuery } from '../../store/link';
import { useBench } from '../bench';

const SAID_MS = 2500;

export function Share({ version }: { readonly version: 'draft' | number }) {
  const { store } = useBench();
  const [said, setSaid] = useState<string | null>(null);
  const share = async () => {
    const link = `${window.location.origin}${window.location.pathname}?${toQuery(store.getState(), version)}`;
    try {
      await navigator.clipboard.writeText(link);
      setSaid('Link copied');
    } catch {
      setSaid('Copy it from the address bar');
    }
    window.setTimeout(() => setSaid(null), SAID_MS);
  };
  return (
    <button type="button" className="button button-quiet" onClick={() => void share()}>
      <span aria-live="polite">{said ?? 'Share'}</span>
    </button>
  );
}
