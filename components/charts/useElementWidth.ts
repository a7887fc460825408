import { useCallback, useRef, useState } from 'react';
import type { View } from 'react-native';

/** Width of an element in CSS pixels, followed while it changes; `first` until it is known. */
export function useElementWidth(first: number): [(view: View | null) => void, number] {
  const [width, setWidth] = useState(first);
  const observer = useRef<ResizeObserver | null>(null);
  const ref = useCallback(
    (view: View | null) => {
      observer.current?.disconnect();
      const element = view as unknown as HTMLElement | null;
      if (!element || typeof ResizeObserver === 'undefined') return;
      observer.current = new ResizeObserver(() => setWidth(element.clientWidth || first));
      observer.current.observe(element);
      setWidth(element.clientWidth || first);
    },
    [first],
  );
  return [ref, width];
}
