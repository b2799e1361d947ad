'use client';
import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { useEffect } from 'react';

interface Step {
  name: string;
  href: string;
}

/** To the station before and after this one in the ranking: by link, or by the keys [ and ]. */
export function RankingSteps({ previous, next }: { previous: Step | null; next: Step | null }) {
  const router = useRouter();
  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      if (event.ctrlKey || event.metaKey || event.altKey || isTyping(event.target)) return;
      const step = event.key === '[' ? previous : event.key === ']' ? next : null;
      if (step) router.push(step.href);
    };
    window.addEventListener('keydown', onKey);
    return () => window.removeEventListener('keydown', onKey);
  }, [previous, next, router]);
  return (
    <>
      {previous && (
        <Link href={previous.href} prefetch={false} rel="prev" aria-keyshortcuts="[">
          ↑ {previous.name} <kbd>[</kbd>
        </Link>
      )}
      {next && (
        <Link href={next.href} prefetch={false} rel="next" aria-keyshortcuts="]">
          ↓ {next.name} <kbd>]</kbd>
        </Link>
      )}
    </>
  );
}

/** Keys pressed in a field belong to the field. */
function isTyping(target: EventTarget | null): boolean {
  return target instanceof HTMLElement && target.closest('input, textarea, select, [contenteditable]') !== null;
}
