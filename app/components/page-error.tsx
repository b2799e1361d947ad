'use client';
import { ErrorNote } from './notes.tsx';
import styles from './page-error.module.css';
import ui from './ui.module.css';

interface Props {
  /** what did not work, as a sentence without its full stop */
  what: string;
  error: Error & { digest?: string };
  reset: () => void;
}

/** A page that failed: what failed, a way to try again, and the number under which the server noted the cause. */
export function PageError({ what, error, reset }: Props) {
  return (
    <main id="main" className={styles.page}>
      <ErrorNote title={what}>
        <p>The records are as they were. Try again; if it fails again, the server’s own notes say why.</p>
        {error.digest && <p>Noted there as {error.digest}.</p>}
      </ErrorNote>
      <button type="button" className={ui.primary} onClick={reset}>
        Try again
      </button>
    </main>
  );
}
