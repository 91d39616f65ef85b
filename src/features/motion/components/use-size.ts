/** The size of an element's content box in CSS pixels, kept in step with the page. */
import { useEffect, useRef, useState, type RefObject } from 'react';

export interface Size {
  readonly width: number;
  readonly height: number;
}

/** `first` holds until the element has been measured. */
export function useSize<E extends HTMLElement>(first: Size): [RefObject<E | null>, Size] {
  const ref = useRef<E>(null);
  const [size, setSize] = useState(first);
  useEffect(() => {
    const element = ref.current;
    if (!element) return undefined;
    const observer = new ResizeObserver(() => {
      const { clientWidth: width, clientHeight: height } = element;
      if (width > 0 && height > 0) {
        setSize((before) =>
          before.width === width && before.height === height ? before : { width, height },
        );
      }
    });
    observer.observe(element);
    return () => observer.disconnect();
  }, []);
  return [ref, size];
}
