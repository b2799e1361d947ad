'use client';
import { type RefObject, useEffect, useRef, useState } from 'react';

/** Width of an element in CSS pixels, followed as it changes. Before it is known (on the server): `fallback`.
 *  @returns the element's ref, its width, and whether that is known */
export function useWidth<T extends HTMLElement>(fallback: number): [RefObject<T | null>, number, boolean] {
  const ref = useRef<T | null>(null);
  const [width, setWidth] = useState<number | null>(null);
  useEffect(() => {
    const element = ref.current;
    if (!element) return;
    const observer = new ResizeObserver(([entry]) => setWidth(Math.max(1, Math.floor(entry.contentRect.width))));
    observer.observe(element);
    return () => observer.disconnect();
  }, []);
  return [ref, width ?? fallback, width !== null];
}
