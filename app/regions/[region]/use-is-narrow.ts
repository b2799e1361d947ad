import { useSyncExternalStore } from 'react';

/** Below this map and ranking do not fit side by side; the same width stands in the style sheets. */
const NARROW = '(max-width: 760px)';

function subscribe(listener: () => void): () => void {
  const query = matchMedia(NARROW);
  query.addEventListener('change', listener);
  return () => query.removeEventListener('change', listener);
}

/** True on a phone. The server, which cannot know, writes the wide screen. */
export const useIsNarrow = (): boolean =>
  useSyncExternalStore(
    subscribe,
    () => matchMedia(NARROW).matches,
    () => false,
  );
