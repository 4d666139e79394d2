import { useLayoutEffect, useRef, useState } from 'react';
import type { RefObject } from 'react';
import type { Size } from './stage-geometry.ts';

/** The size of an element in CSS pixels, kept up to date; `usual` until it is known. */
export function useSize<E extends HTMLElement>(usual: Size): [RefObject<E | null>, Size] {
  const ref = useRef<E>(null);
  const [size, setSize] = useState(usual);
  useLayoutEffect(() => {
    const element = ref.current;
    if (element === null) return;
    const measure = () => {
      const { clientWidth: width, clientHeight: height } = element;
      if (width > 0 && height > 0) setSize((now) => (now.width === width && now.height === height ? now : { width, height }));
    };
    measure();
    const observer = new ResizeObserver(measure);
    observer.observe(element);
    return () => observer.disconnect();
  }, []);
  return [ref, size];
}
