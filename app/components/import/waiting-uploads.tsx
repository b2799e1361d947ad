'use client';
import { useRouter } from 'next/navigation';
import { count } from '../format.ts';
import ui from '../ui.module.css';
import styles from './import.module.css';
import { discardUpload } from './upload-client.ts';
import type { Waiting } from './waiting.ts';

/** Files that were sent before and wait: to go on with, or to give up. */
export function WaitingUploads({ waiting, onOpen }: { waiting: readonly Waiting[]; onOpen(id: string): void }) {
  const router = useRouter();
  if (waiting.length === 0) return null;
  const giveUp = async (id: string) => {
    // one that is gone already is what was wanted
    await discardUpload(id).catch(() => undefined);
    router.refresh();
  };
  return (
    <section className={styles.waiting} aria-label="Files that wait for their import">
      <h3>Sent before, not yet imported</h3>
      <ul>
        {waiting.map(({ id, createdAt, files, first }) => (
          <li key={id}>
            <span>
              {files === 1 ? first : `${first} and ${count(files - 1, 'other file')}`}, sent{' '}
              <time dateTime={createdAt}>{createdAt.slice(0, 16).replace('T', ' ')}</time> UTC
            </span>
            <button type="button" className={ui.button} onClick={() => onOpen(id)}>
              Go on
            </button>
            <button type="button" className={ui.plain} aria-label={`Give up ${first}`} onClick={() => void giveUp(id)}>
              give up
            </button>
          </li>
        ))}
      </ul>
    </section>
  );
}
