'use client';
import { type ReactNode, useId } from 'react';
import type { FieldPlace, ValueCandidate } from '@/lib/intake/types';
import styles from './import.module.css';

interface Props {
  candidates: readonly ValueCandidate[];
  chosen: FieldPlace | undefined;
  onChoose(place: FieldPlace): void;
  children?: ReactNode;
}

/** Which column holds the flows: each candidate with its first values, one under another as in the file. */
export function ColumnChoice({ candidates, chosen, onChoose, children }: Props) {
  const name = useId();
  const isChosen = (place: FieldPlace) => JSON.stringify(place) === JSON.stringify(chosen);
  return (
    <>
      <fieldset className={styles.columns}>
        <legend>Which column holds the flows?</legend>
        <div className={styles.columnRow}>
          {candidates.map((candidate) => (
            <label key={candidate.label} className={styles.column}>
              <input
                type="radio"
                name={name}
                checked={isChosen(candidate.place)}
                onChange={() => onChoose(candidate.place)}
              />
              <span className={styles.columnName}>{candidate.label}</span>
              <span className={styles.samples}>{candidate.samples.join('\n')}</span>
            </label>
          ))}
        </div>
      </fieldset>
      {children}
    </>
  );
}
