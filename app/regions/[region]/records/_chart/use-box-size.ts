'use client';
import { type RefObject, useEffect, useRef, useState } from 'react';

export interface BoxSize {
  width: number;
  height: number;
}

/** Inner size of an element in CSS pixels, without its scroll bars, followed as it changes.
 *  @param fallback  before it is known */
export function useBoxSize(fallback: BoxSize): [RefObject<HTMLDivElement | null>, BoxSize] {
  const ref = useRef<HTMLDivElement | null>(null);
  const [size, setSize] = useState(fallback);
  useEffect(() => {
    const element = ref.current;
    if (!element) return;
    const look = () => {
      const next = { width: Math.max(1, element.clientWidth), height: Math.max(1, element.clientHeight) };
      setSize((now) => (now.width === next.width && now.height === next.height ? now : next));
    };
    const observer = new ResizeObserver(look);
    observer.observe(element);
    look();
    return () => observer.disconnect();
  }, []);
  return [ref, size];
}
