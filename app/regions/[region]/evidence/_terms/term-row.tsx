'use client';
import { useId, useState } from 'react';
import { fixed, MISSING } from '@/app/components/format';
import ui from '@/app/components/ui.module.css';
import type { Alternative } from '@/lib/region/window-types';
import table from '../evidence-table.module.css';
import { MovementList } from './movement-list.tsx';
import { movementWords } from './term-words.ts';
import styles from './terms.module.css';

interface Props {
  alternative: Alternative;
  onUse(change: Readonly<Record<string, string>>): void;
  movementOf(change: Readonly<Record<string, string>>): string;
}

/** The ranking under one choice of a term: its counts, how its order differs, and on demand who moved. */
export function TermRow({ alternative, onUse, movementOf }: Props) {
  const { label, current, ranked, falling, rising, tau, movedFar, furthest, problem, change } = alternative;
  const [open, setOpen] = useState(false);
  const listId = useId();
  if (problem !== null) {
    return (
      <tr>
        <th scope="row">{label}</th>
        <td colSpan={7} className={table.words}>
          Cannot be ranked: {problem}
        </td>
      </tr>
    );
  }
  return (
    <>
      <tr data-current={current || undefined} className={current ? table.current : undefined}>
        <th scope="row">{label}</th>
        <td className={table.number}>{fixed(ranked)}</td>
        <td className={table.number}>{fixed(falling)}</td>
        <td className={table.number}>{fixed(rising)}</td>
        {current ? (
          <td colSpan={4} className={table.quiet}>
            the terms at hand
          </td>
        ) : (
          <>
            <td className={table.number}>{fixed(tau, 2)}</td>
            <td className={table.number}>{fixed(movedFar)}</td>
            <td className={table.words}>{furthest ? movementWords(furthest) : tau === null ? MISSING : 'nobody'}</td>
            <td>
              <span className={styles.ways}>
                <button
                  type="button"
                  className={ui.plain}
                  aria-expanded={open}
                  aria-controls={listId}
                  aria-label={`Who moved: ${label}`}
                  onClick={() => setOpen(!open)}
                >
                  Who moved
                </button>
                <button
                  type="button"
                  className={ui.plain}
                  aria-label={`Use these terms: ${label}`}
                  onClick={() => onUse(change)}
                >
                  Use these
                </button>
              </span>
            </td>
          </>
        )}
      </tr>
      {open && (
        <tr id={listId}>
          <td colSpan={8} className={table.words}>
            <MovementList address={movementOf(change)} label={label} />
          </td>
        </tr>
      )}
    </>
  );
}
