/** Pointer, wheel and leave events of an element as gestures, in its own CSS pixels. */
import type { Gestures } from './gesture';
import type { XY } from './pen';

const WHEEL = 0.0015;
const PINCH_WHEEL = 0.01;

export function listen(
  element: HTMLElement,
  gestures: Gestures,
  zoomBy: (factor: number) => void,
): () => void {
  const at = (event: PointerEvent): XY => {
    const { left, top } = element.getBoundingClientRect();
    return [event.clientX - left, event.clientY - top];
  };
  const until = new AbortController();
  const on = <K extends keyof HTMLElementEventMap>(
    name: K,
    listener: (event: HTMLElementEventMap[K]) => void,
  ) => element.addEventListener(name, listener, { signal: until.signal, passive: name !== 'wheel' });
  on('pointerdown', (event) => {
    if (event.button !== 0) return;
    element.setPointerCapture(event.pointerId);
    gestures.down(event.pointerId, at(event));
  });
  on('pointermove', (event) => gestures.move(event.pointerId, at(event)));
  on('pointerup', (event) => gestures.up(event.pointerId, at(event)));
  on('pointercancel', () => void gestures.cancel());
  on('pointerleave', () => gestures.leave());
  on('wheel', (event) => {
    event.preventDefault();
    zoomBy(Math.exp(-event.deltaY * (event.ctrlKey ? PINCH_WHEEL : WHEEL)));
  });
  return () => until.abort();
}
