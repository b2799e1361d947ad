'use client';
import { useRouter } from 'next/navigation';
import { type FormEvent, useCallback, useId, useState } from 'react';
import type { FlowUnit } from '@/lib/intake/types';
import type { ImportOutcome } from '@/lib/jobs/import-types';
import { count } from './format.ts';
import { type Answers, alikeTo, answeredAlike, isAnswered, isAsked } from './import/answers.ts';
import { ChosenFiles } from './import/chosen-files.tsx';
import { FileDrop } from './import/file-drop.tsx';
import styles from './import/import.module.css';
import { JobBar, UploadBar } from './import/job-progress.tsx';
import { ProblemView, UnitSelect } from './import/problem-view.tsx';
import { FileReport } from './import/report-view.tsx';
import { useImport } from './import/use-import.ts';
import { regionHref } from './links.ts';
import { ErrorNote } from './notes.tsx';
import ui from './ui.module.css';

interface Props {
  /** slug of the region to import into; null makes a new one, and asks for its name */
  region: string | null;
  /** an import that is under way already */
  runningJob?: string | null;
}

/** Files in, report out: choosing, sending, watching, answering what a file leaves open, and what became of each. */
export function ImportForm({ region, runningJob = null }: Props) {
  const router = useRouter();
  const onTaken = useCallback(() => router.refresh(), [router]);
  const flow = useImport({ region, runningJob, onTaken });
  const { state, slug } = flow;
  switch (state.stage) {
    case 'sending':
      return <UploadBar sent={state.sent} total={state.total} onCancel={() => void flow.cancel()} />;
    case 'working':
      return <JobBar progress={flow.job?.progress ?? null} onCancel={() => void flow.cancel()} />;
    case 'taken':
      return (
        <>
          <Taken slug={slug ?? ''} outcome={state.outcome} />
          <FileDrop onFiles={flow.addFiles} />
        </>
      );
    case 'refused':
      return (
        <Refused
          outcome={state.outcome}
          error={state.error}
          filesAtHand={flow.files.length > 0}
          onRetry={(answers) => void flow.retry(answers)}
          onAgain={flow.again}
        />
      );
    default:
      return (
        <>
          {state.stage === 'cancelled' && (
            <p role="status" className={styles.status}>
              Cancelled. Nothing was changed.
            </p>
          )}
          {state.stage === 'choosing' && state.error && (
            <ErrorNote title="The files were not taken">{state.error}</ErrorNote>
          )}
          <FileDrop onFiles={flow.addFiles} />
          {flow.files.length > 0 && (
            <StartForm
              files={flow.files}
              newRegion={slug === null}
              onRemove={flow.removeFile}
              onStart={(unit, by, name) =>
                void flow.start({ ...(unit ? { all: { unit } } : {}), ...(by ? { by } : {}) }, name)
              }
            />
          )}
        </>
      );
  }
}

interface StartProps {
  files: readonly File[];
  newRegion: boolean;
  onRemove(file: File): void;
  onStart(unit: FlowUnit | undefined, by: string, name: string): void;
}

/** The files at hand, what to know about them, and the button that sends them. */
function StartForm({ files, newRegion, onRemove, onStart }: StartProps) {
  const [unit, setUnit] = useState<FlowUnit>();
  const [by, setBy] = useState('');
  const [name, setName] = useState('');
  const id = useId();
  const submit = (event: FormEvent) => {
    event.preventDefault();
    onStart(unit, by.trim(), name.trim());
  };
  return (
    <form className={styles.start} onSubmit={submit}>
      <ChosenFiles files={files} onRemove={onRemove} />
      <div className={styles.fields}>
        {newRegion && (
          <label className={ui.label} htmlFor={`${id}-name`}>
            Name of the new region
            <input
              id={`${id}-name`}
              className={ui.input}
              required
              maxLength={80}
              value={name}
              onChange={(event) => setName(event.target.value)}
            />
          </label>
        )}
        <label className={ui.label} htmlFor={`${id}-unit`}>
          Unit, where a file does not say
          <UnitSelect id={`${id}-unit`} value={unit} onChange={setUnit} />
        </label>
        <label className={ui.label} htmlFor={`${id}-by`}>
          Imported by (for the list)
          <input
            id={`${id}-by`}
            className={ui.input}
            maxLength={80}
            autoComplete="name"
            value={by}
            onChange={(event) => setBy(event.target.value)}
          />
        </label>
        <button type="submit" className={ui.primary}>
          Import {count(files.length, 'file')}
        </button>
      </div>
    </form>
  );
}

function Taken({ slug, outcome }: { slug: string; outcome: ImportOutcome }) {
  return (
    <div className={styles.outcome}>
      <div className={styles.outcomeHead}>
        <div role="status">
          <h2>{count(outcome.taken.length, 'file')} taken</h2>
        </div>
        <a className={ui.primary} href={regionHref(slug, 'map')}>
          Open the map
        </a>
      </div>
      {outcome.taken.map((file) => (
        <FileReport
          key={file.importId}
          file={file}
          rejectedHref={`/api/regions/${encodeURIComponent(slug)}/imports/${file.importId}/rejected`}
        />
      ))}
    </div>
  );
}

interface RefusedProps {
  outcome: ImportOutcome;
  error: string | null;
  /** false when the page was opened anew since: files must then be chosen again */
  filesAtHand: boolean;
  onRetry(answers: Answers): void;
  onAgain(): void;
}

function Refused({ outcome, error, filesAtHand, onRetry, onAgain }: RefusedProps) {
  const [answers, setAnswers] = useState<Answers>({});
  const { problems } = outcome;
  // without a problem of a file it was the program or the machine: the same files may pass the next time
  const ready = problems.every((problem) => isAnswered(problem, answers[problem.file]));
  const asked = problems.some(isAsked);
  return (
    <div className={styles.outcome}>
      <div role="alert">
        <h2>{asked ? 'Something has to be told first' : 'The files were not taken'}</h2>
        <p className={styles.summary}>
          {problems.length === 0 && error ? error : 'Files are taken together or not at all: nothing was changed.'}
        </p>
      </div>
      {problems.map((problem) => (
        <ProblemView
          key={problem.file}
          problem={problem}
          answer={answers[problem.file]}
          alike={alikeTo(problem, problems).length}
          onAnswer={(answer) => setAnswers((now) => answeredAlike(now, problems, problem, answer))}
        />
      ))}
      <div className={styles.actions}>
        {filesAtHand ? (
          <button type="button" className={ui.primary} disabled={!ready} onClick={() => onRetry(answers)}>
            Try again
          </button>
        ) : (
          <p className={ui.hint}>This page was opened anew since: choose the files once more.</p>
        )}
        <button type="button" className={ui.button} onClick={onAgain}>
          Choose other files
        </button>
      </div>
    </div>
  );
}
