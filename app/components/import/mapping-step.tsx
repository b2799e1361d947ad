'use client';
import { type FormEvent, useEffect, useState } from 'react';
import type { UploadedFile } from '@/lib/jobs/upload-types';
import { count } from '../format.ts';
import { ErrorNote } from '../notes.tsx';
import ui from '../ui.module.css';
import { ArchiveNote } from './archive-note.tsx';
import type { ChoicesEdit } from './choices-edit.ts';
import { FileDetail } from './file-detail.tsx';
import { FilePicker } from './file-drop.tsx';
import { FileList, standsOf } from './file-list.tsx';
import styles from './mapping.module.css';
import type { Order, useImport } from './use-import.ts';
import { useLooks } from './use-looks.ts';

interface Props {
  flow: ReturnType<typeof useImport>;
  /** null: the import makes a region */
  region: string | null;
  /** whether records stand that the files may be unlike */
  comparable: boolean;
  order: Order;
  setBy(by: string): void;
  setName(name: string): void;
}

/** Every file of an upload as it is understood, before anything is imported. */
export function MappingStep({ flow, region, comparable, order, setBy, setName }: Props) {
  const { upload, leftOut, refusals, state } = flow;
  const files = upload?.files ?? [];
  const [chosen, setChosen] = useState<string | null>(null);
  const selected = files.some(({ file }) => file === chosen) ? chosen : firstToSee(files, refusals);
  const [together, setTogether] = useState(true);
  const looks = useLooks({
    ...{
      id: upload?.archive ? null : (upload?.id ?? null),
      files,
      setFiles: flow.setFiles,
      selected,
      onError: flow.fail,
    },
    onRegistry: () => void flow.refresh(),
  });
  // What is selected stays so, also when its question has been answered.
  useEffect(() => setChosen(selected), [selected]);
  const current = files.find(({ file }) => file === selected);
  const alike = files
    .filter((one) => one !== current && current?.likeness && one.likeness === current.likeness)
    .map(({ file }) => file);
  const change = (edit: ChoicesEdit) => {
    const others = together ? alike : [];
    flow.forgetRefusals([selected ?? '', ...others]);
    looks.change(edit, others);
  };
  const stands = files.map((file) => standsOf(file, leftOut.has(file.file), refusals[file.file]));
  const open = stands.filter((one) => one === 'asks' || one === 'unreadable').length;
  const error = state.stage === 'mapping' ? state.error : null;
  return (
    <section className={styles.step} aria-label="Files before they are imported">
      <header className={styles.stepHead}>
        <div role="status">
          <h2>{count(files.length, 'file')} to import</h2>
          <p>{upload?.archive ? 'Nothing has been imported yet.' : statusWords(open, looks.waiting)}</p>
        </div>
        <p className={styles.actions}>
          <FilePicker onFiles={(more) => void flow.send(more)} words="Add files…" />
          <button type="button" className={ui.button} onClick={() => void flow.giveUp()}>
            Give up
          </button>
        </p>
      </header>
      {error && <ErrorNote>{error}</ErrorNote>}
      {upload && upload.notes.length > 0 && <PassedOver notes={upload.notes} />}
      {upload?.archive ? (
        <ArchiveNote archive={upload.archive} />
      ) : (
        <div className={styles.body}>
          <FileList
            {...{ files, leftOut, refusals, selected }}
            onSelect={setChosen}
            onLeaveOut={(file, out) => void flow.leaveOut(file, out)}
          />
          {current && (
            <FileDetail
              file={current.file}
              sight={looks.preview}
              choices={current.choices}
              refusal={refusals[current.file]}
              busy={looks.busy}
              {...{ region, together, change }}
              alike={alike.length}
              onTogether={setTogether}
            />
          )}
        </div>
      )}
      <OrderBar
        {...{ order, setBy, setName, comparable }}
        taken={flow.taken}
        newRegion={region === null}
        open={open}
        onStart={() => void flow.start(order, comparable)}
      />
    </section>
  );
}

/** What of archives is no file to import. */
function PassedOver({ notes }: { notes: readonly string[] }) {
  const [first] = notes;
  if (notes.length === 1) return <p className={styles.note}>{first}</p>;
  return (
    <details className={styles.reports}>
      <summary>{count(notes.length, 'file')} of archives passed over</summary>
      <ul className={styles.note}>
        {notes.map((note) => (
          <li key={note}>{note}</li>
        ))}
      </ul>
    </details>
  );
}

/** A file that asks something goes before one that is ready. */
function firstToSee(files: readonly UploadedFile[], refusals: Readonly<Record<string, unknown>>): string | null {
  const asking = files.find(({ state, file }) => state === 'asks' || state === 'unreadable' || file in refusals);
  return (asking ?? files[0])?.file ?? null;
}

function statusWords(open: number, waiting: number): string {
  const looking = waiting > 0 ? ` ${count(waiting, 'file')} still to be looked at.` : '';
  if (open > 0)
    return `${count(open, 'file')} cannot be taken yet: answer what is asked, or leave ${open === 1 ? 'it' : 'them'} out.${looking}`;
  return `This is how they are understood. Nothing has been imported yet.${looking}`;
}

interface OrderBarProps extends Pick<Props, 'order' | 'setBy' | 'setName'> {
  newRegion: boolean;
  comparable: boolean;
  taken: number;
  open: number;
  onStart(): void;
}

function OrderBar({ order, setBy, setName, newRegion, comparable, taken, open, onStart }: OrderBarProps) {
  const submit = (event: FormEvent) => {
    event.preventDefault();
    onStart();
  };
  return (
    <form className={styles.order} onSubmit={submit}>
      {newRegion && (
        <label className={ui.label}>
          Name of the new region
          <input
            className={ui.input}
            required
            maxLength={80}
            value={order.name}
            onChange={(event) => setName(event.target.value)}
          />
        </label>
      )}
      <label className={ui.label}>
        Imported by (for the list)
        <input
          className={ui.input}
          maxLength={80}
          autoComplete="name"
          value={order.by}
          onChange={(event) => setBy(event.target.value)}
        />
      </label>
      <button type="submit" className={ui.primary} disabled={taken === 0 || open > 0}>
        {comparable ? `Compare ${count(taken, 'file')} with what stands` : `Import ${count(taken, 'file')}`}
      </button>
    </form>
  );
}
