import { useLayoutEffect, useRef, useState } from 'react';
import type { RefObject } from 'react';

/** The width of an element in CSS pixels, kept up to date; `usual` until it is known. */
export function useWidth<E extends HTMLElement>(usual: number): [RefObject<E | null>, number] {
  const ref = useRef<E>(null);
  const [width, setWidth] = useState(usual);
  useLayoutEffect(() => {
    const element = ref.current;
    if (element === null) return;
    const measure = () => {
      if (element.clientWidth > 0) setWidth(element.clientWidth);
    };
    measure();
    const observer = new ResizeObserver(measure);
    observer.observe(element);
    return () => observer.disconnect();
  }, []);
  return [ref, width];
}
