/** The workbench's keys, anywhere on the page but in fields, lists and whatever has taken the key first. */
import { useEffect } from 'react';
import { runKey } from '../store/commands';
import { useBench } from './bench';

const TYPING =
  'input, textarea, select, [contenteditable="true"], [role="menu"], [role="listbox"], [role="grid"], [role="combobox"]';

export function useKeys(): void {
  const { store, scene, home } = useBench();
  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      if (event.defaultPrevented || (event.target instanceof Element && event.target.closest(TYPING))) return;
      if (event.key === 'Escape' && store.getState().open) store.setState({ open: null });
      else if (runKey(event, { store, oldest: scene.oldest, home })) event.preventDefault();
    };
    document.addEventListener('keydown', onKey);
    return () => document.removeEventListener('keydown', onKey);
  }, [store, scene.oldest, home]);
}
