import { useSyncExternalStore } from 'react';

/** Which station the pointer or the keyboard is on. Kept outside React state, so that moving over the map renders two
 *  rows of the table and not the whole screen. */
export interface HoverStore {
  get: () => string | null;
  set: (code: string | null) => void;
  subscribe: (listener: () => void) => () => void;
}

export function createHoverStore(): HoverStore {
  const listeners = new Set<() => void>();
  let hovered: string | null = null;
  return {
    get: () => hovered,
    set: (code) => {
      if (code === hovered) return;
      hovered = code;
      for (const listener of listeners) listener();
    },
    subscribe: (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
  };
}

/** Whether this station is the hovered one; renders only when that changes. */
export const useIsHovered = (store: HoverStore, code: string): boolean =>
  useSyncExternalStore(
    store.subscribe,
    () => store.get() === code,
    () => false,
  );

export const useHovered = (store: HoverStore): string | null =>
  useSyncExternalStore(store.subscribe, store.get, () => null);
