'use client';
import { type FormEvent, useId, useState } from 'react';
import { ErrorNote } from '@/app/components/notes';
import ui from '@/app/components/ui.module.css';
import { useWho } from '@/app/components/use-who';
import { MARK_KINDS, type MarkKind } from '@/lib/store/marks-on-flags';
import styles from './marks.module.css';
import { addMark, MARK_WORDS } from './marks-address.ts';
import { useChange } from './use-change.ts';

interface Props {
  slug: string;
  code: string;
  /** ISO dates; '' while none is chosen */
  first: string;
  last: string;
  onDates(first: string, last: string): void;
  onChanged(): void;
}

/** Rejects, accepts or notes a stretch of days, with a reason and a name. */
export function MarkForm({ slug, code, first, last, onDates, onChanged }: Props) {
  const group = useId();
  const [kind, setKind] = useState<MarkKind>('reject');
  const [reason, setReason] = useState('');
  const [by, setBy] = useWho();
  const [said, setSaid] = useState('');
  const { busy, problem, make } = useChange(onChanged);

  const submit = async (event: FormEvent) => {
    event.preventDefault();
    setSaid('');
    const done = await make(() => addMark(slug, code, { kind, first, last, reason: reason.trim(), by: by.trim() }));
    if (!done) return;
    setSaid(`${first} to ${last} ${MARK_WORDS[kind].done}. It stands in the list of marks and can be undone there.`);
    setReason('');
  };

  return (
    <form className={styles.form} onSubmit={(event) => void submit(event)} aria-label="Mark days">
      <fieldset className={styles.kinds}>
        <legend>Mark days</legend>
        {MARK_KINDS.map((value) => (
          <label key={value} className={ui.check}>
            <input type="radio" name={group} checked={kind === value} onChange={() => setKind(value)} />
            {MARK_WORDS[value].verb}
          </label>
        ))}
      </fieldset>
      <p className={ui.hint}>{MARK_WORDS[kind].effect}</p>
      <div className={styles.fields}>
        <label className={ui.label}>
          From
          <input
            className={ui.input}
            type="date"
            required
            value={first}
            onChange={(event) => onDates(event.currentTarget.value, last)}
          />
        </label>
        <label className={ui.label}>
          To
          <input
            className={ui.input}
            type="date"
            required
            min={first || undefined}
            value={last}
            onChange={(event) => onDates(first, event.currentTarget.value)}
          />
        </label>
        <label className={`${ui.label} ${styles.reason}`}>
          Reason
          <input
            className={ui.input}
            required
            maxLength={1000}
            value={reason}
            placeholder="ice at the gauge"
            onChange={(event) => setReason(event.currentTarget.value)}
          />
        </label>
        <label className={ui.label}>
          By
          <input
            className={ui.input}
            maxLength={200}
            value={by}
            placeholder="your name"
            onChange={(event) => setBy(event.currentTarget.value)}
          />
        </label>
        <button type="submit" className={ui.primary} disabled={busy}>
          {busy ? 'Marking…' : `${MARK_WORDS[kind].verb} these days`}
        </button>
      </div>
      {problem && <ErrorNote>{problem}</ErrorNote>}
      <p role="status" className={styles.said}>
        {said}
      </p>
    </form>
  );
}
