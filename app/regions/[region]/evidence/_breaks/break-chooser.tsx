'use client';
import { type FormEvent, useState } from 'react';
import ui from '@/app/components/ui.module.css';
import { MOST_BREAKS } from './break-list.ts';
import styles from './breaks.module.css';

interface Props {
  years: readonly number[];
  /** low-flow years that the region's records have */
  span: readonly [number, number];
  labelOf(year: number): string;
  onChange(years: number[]): void;
  /** what holds while none is chosen, and the button back to it */
  none?: string;
  back?: string;
}

const NONE = 'No break is chosen: each station is parted at its own dated changes (a dam, an abstraction, a new weir).';
const BACK = 'Back to each station’s own changes';

/** Which breaks part the years: some that a person names, or each station's own dated changes. */
export function BreakChooser({ years, span, labelOf, onChange, none = NONE, back = BACK }: Props) {
  const [text, setText] = useState('');
  const full = years.length >= MOST_BREAKS;
  const add = (event: FormEvent) => {
    event.preventDefault();
    const year = Number(text);
    if (!years.includes(year)) onChange([...years, year]);
    setText('');
  };
  return (
    <div className={styles.chooser}>
      <form onSubmit={add} className={styles.form} aria-label="Choose a break">
        <label className={ui.label}>
          First low-flow year after a break
          <input
            className={ui.input}
            type="number"
            required
            min={span[0] + 1}
            max={span[1]}
            step={1}
            value={text}
            disabled={full}
            placeholder={String(Math.round((span[0] + span[1]) / 2))}
            onChange={(event) => setText(event.currentTarget.value)}
          />
        </label>
        <button type="submit" className={ui.button} disabled={full}>
          Add the break
        </button>
      </form>
      {years.length === 0 ? (
        <p className={styles.hint}>{none}</p>
      ) : (
        <ul className={styles.chosen} aria-label="Chosen breaks">
          {years.map((year) => (
            <li key={year}>
              {labelOf(year)} and after
              <button
                type="button"
                className={ui.plain}
                aria-label={`Remove the break before ${labelOf(year)}`}
                onClick={() => onChange(years.filter((other) => other !== year))}
              >
                Remove
              </button>
            </li>
          ))}
          <li>
            <button type="button" className={ui.plain} onClick={() => onChange([])}>
              {back}
            </button>
          </li>
        </ul>
      )}
      {full && <p className={styles.hint}>More than {MOST_BREAKS} breaks leave too few years between them.</p>}
    </div>
  );
}
