'use client';
import { ErrorNote } from '@/app/components/notes';
import ui from '@/app/components/ui.module.css';
import type { MarkView } from '@/lib/jobs/records-types';
import styles from './marks.module.css';
import { MARK_WORDS, undoMark } from './marks-address.ts';
import { useChange } from './use-change.ts';

interface Props {
  slug: string;
  marks: readonly MarkView[];
  onChanged(): void;
}

/** What people said about stretches of days, each with its way back. */
export function MarkList({ slug, marks, onChanged }: Props) {
  const { busy, problem, make } = useChange(onChanged);
  return (
    <>
      {problem && <ErrorNote>{problem}</ErrorNote>}
      <ul className={styles.marks}>
        {marks.map((mark) => (
          <li key={mark.id}>
            <span>
              <strong>{MARK_WORDS[mark.kind].done}</strong>{' '}
              <span className={styles.dates}>
                {mark.first === mark.last ? mark.first : `${mark.first} to ${mark.last}`}
              </span>
              : {mark.reason}{' '}
              <span className={styles.who}>
                – {mark.by || 'no name given'}, <time dateTime={mark.createdAt}>{mark.createdAt.slice(0, 10)}</time>
              </span>
            </span>
            <button
              type="button"
              className={ui.plain}
              disabled={busy}
              aria-label={`Undo: ${MARK_WORDS[mark.kind].done} ${mark.first} to ${mark.last}`}
              onClick={() => void make(() => undoMark(slug, mark.code, mark.id))}
            >
              Undo
            </button>
          </li>
        ))}
      </ul>
    </>
  );
}
