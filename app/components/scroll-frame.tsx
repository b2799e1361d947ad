import type { ReactNode } from 'react';

interface Props {
  /** what is inside, for those who come to it by keyboard */
  label: string;
  className?: string;
  children: ReactNode;
}

/** A frame whose content may be wider or taller than it is. It takes the focus, so that arrow keys can scroll it. */
export function ScrollFrame({ label, className, children }: Props) {
  const focusable = { tabIndex: 0 };
  return (
    <section {...focusable} aria-label={label} className={className}>
      {children}
    </section>
  );
}
