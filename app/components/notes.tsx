import type { ReactNode } from 'react';
import styles from './notes.module.css';

/** Nothing is here yet, and what to do about it. */
export function Empty({ title, children }: { title: string; children?: ReactNode }) {
  return (
    <section className={styles.empty}>
      <h2>{title}</h2>
      <div className={styles.words}>{children}</div>
    </section>
  );
}

/** Something went wrong: what, and the remedy. Announced to screen readers when it appears. */
export function ErrorNote({ title = 'This did not work', children }: { title?: string; children: ReactNode }) {
  return (
    <div role="alert" className={styles.error}>
      <strong>{title}</strong>
      <div>{children}</div>
    </div>
  );
}

/** A thing the reader must know before trusting a figure. */
export function WarningNote({ children }: { children: ReactNode }) {
  return (
    <p className={styles.warning}>
      <span aria-hidden="true" className={styles.sign}>
        !
      </span>
      <span>{children}</span>
    </p>
  );
}

/** Work is under way. */
export function Loading({ children = 'Reading the records…' }: { children?: ReactNode }) {
  return (
    <p role="status" className={styles.loading}>
      <span aria-hidden="true" className={styles.drip} />
      {children}
    </p>
  );
}
