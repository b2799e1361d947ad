'use client';
import { Dialog } from '@base-ui/react/dialog';
import { type FormEvent, useState } from 'react';
import { count } from '@/app/components/format';
import { ErrorNote } from '@/app/components/notes';
import ui from '@/app/components/ui.module.css';
import { useWho } from '@/app/components/use-who';
import type { FindingRow } from '@/lib/jobs/records-types';
import type { MarkKind } from '@/lib/store/marks-on-flags';
import { addMarks, MARK_WORDS } from '../_marks/marks-address.ts';
import { useChange } from '../_marks/use-change.ts';
import { KIND_WORDS } from './finding-words.ts';
import styles from './findings.module.css';

export interface AskedAnswer {
  kind: MarkKind;
  stationName: string;
  /** of one station; one kind where there are several */
  findings: readonly FindingRow[];
}

interface Props {
  slug: string;
  asked: AskedAnswer | null;
  onClose(): void;
  onChanged(): void;
}

/** Asks for reason and name before a finding, or all of a kind at a station, is answered. */
export function AnswerDialog({ slug, asked, onClose, onChanged }: Props) {
  return (
    <Dialog.Root open={asked !== null} onOpenChange={(open) => !open && onClose()}>
      <Dialog.Portal>
        <Dialog.Backdrop className={styles.backdrop} />
        <Dialog.Popup className={styles.dialog}>
          {asked && <AnswerForm slug={slug} asked={asked} onClose={onClose} onChanged={onChanged} />}
        </Dialog.Popup>
      </Dialog.Portal>
    </Dialog.Root>
  );
}

function AnswerForm({ slug, asked, onClose, onChanged }: Props & { asked: AskedAnswer }) {
  const [reason, setReason] = useState('');
  const [by, setBy] = useWho();
  const { busy, problem, make } = useChange(onChanged);
  const { verb, effect } = MARK_WORDS[asked.kind];
  const { findings } = asked;
  const [{ code, first, last, kind }] = findings;
  const what = findings.length > 1 ? count(findings.length, 'finding') : `${first} to ${last}`;

  const submit = async (event: FormEvent) => {
    event.preventDefault();
    const stretches = findings.map(({ first, last }) => ({ first, last }));
    const done = await make(() =>
      addMarks(slug, code, { kind: asked.kind, stretches, reason: reason.trim(), by: by.trim() }),
    );
    if (done) onClose();
  };

  return (
    <form className={styles.answer} onSubmit={(event) => void submit(event)}>
      <Dialog.Title render={<h2>{`${verb} ${what}`}</h2>} />
      <Dialog.Description>
        {KIND_WORDS[kind]} at {asked.stationName}. {effect}
      </Dialog.Description>
      <label className={ui.label}>
        Reason
        <input
          className={ui.input}
          required
          maxLength={1000}
          value={reason}
          onChange={(event) => setReason(event.currentTarget.value)}
        />
      </label>
      <label className={ui.label}>
        By
        <input
          className={ui.input}
          maxLength={200}
          placeholder="your name"
          value={by}
          onChange={(event) => setBy(event.currentTarget.value)}
        />
      </label>
      {problem && <ErrorNote>{problem}</ErrorNote>}
      <div className={styles.buttons}>
        <Dialog.Close className={ui.button} disabled={busy}>
          Leave it
        </Dialog.Close>
        <button type="submit" className={ui.primary} disabled={busy}>
          {busy ? 'Marking…' : verb}
        </button>
      </div>
    </form>
  );
}
