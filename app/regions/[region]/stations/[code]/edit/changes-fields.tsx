'use client';
import { FormField } from '@/app/components/form-field';
import styles from '@/app/components/station-form/station-form.module.css';
import ui from '@/app/components/ui.module.css';
import { CHANGE_KINDS, type ChangeKind } from '@/lib/series/station-history';
import type { ChangeDraft, Problems } from './station-draft.ts';

interface Props {
  changes: readonly ChangeDraft[];
  problems: Problems;
  onChange(changes: ChangeDraft[]): void;
}

/** What changed on the river or at the gauge, and when. */
export function ChangesFields({ changes, problems, onChange }: Props) {
  const set = (key: number, change: Partial<ChangeDraft>) =>
    onChange(changes.map((each) => (each.key === key ? { ...each, ...change } : each)));
  const next = Math.max(-1, ...changes.map(({ key }) => key)) + 1;
  return (
    <section className={styles.section} aria-labelledby="changes-title">
      <h2 id="changes-title">Dated changes</h2>
      <p className={styles.caution}>Drawn on every time axis of the station. They change no figure.</p>
      <ul className={styles.rows} aria-label="Dated changes">
        {changes.map(({ key, date, kind, note }, index) => (
          <li key={key} className={styles.change}>
            <FormField label="Date" problem={problems[`changes.${key}.date`]}>
              {(control) => (
                <input
                  {...control}
                  className={ui.input}
                  placeholder="YYYY-MM-DD"
                  value={date}
                  onChange={(event) => set(key, { date: event.target.value })}
                />
              )}
            </FormField>
            <FormField label="Kind">
              {(control) => (
                <select
                  {...control}
                  className={ui.select}
                  value={kind}
                  onChange={(event) => set(key, { kind: event.target.value as ChangeKind })}
                >
                  {CHANGE_KINDS.map((each) => (
                    <option key={each}>{each}</option>
                  ))}
                </select>
              )}
            </FormField>
            <FormField label="Note" className={styles.wide}>
              {(control) => (
                <input
                  {...control}
                  className={ui.input}
                  value={note}
                  onChange={(event) => set(key, { note: event.target.value })}
                />
              )}
            </FormField>
            <button
              type="button"
              className={ui.button}
              aria-label={`Remove change ${index + 1}`}
              onClick={() => onChange(changes.filter((each) => each.key !== key))}
            >
              Remove
            </button>
          </li>
        ))}
      </ul>
      <button
        type="button"
        className={ui.button}
        onClick={() => onChange([...changes, { key: next, date: '', kind: 'dam', note: '' }])}
      >
        Add a change
      </button>
    </section>
  );
}
