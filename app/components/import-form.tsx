'use client';
import dynamic from 'next/dynamic';
import { useRouter } from 'next/navigation';
import { type ReactNode, useCallback, useState } from 'react';
import type { ImportOutcome, TakenFile } from '@/lib/jobs/import-types';
import type { OverlapRule } from '@/lib/store/lay-parts';
import { count } from './format.ts';
import { FileDrop } from './import/file-drop.tsx';
import styles from './import/import.module.css';
import { JobBar, UploadBar } from './import/job-progress.tsx';
import { ProblemNote } from './import/problem-note.tsx';
import { FileReport } from './import/report-view.tsx';
import { reportId, TakenTable } from './import/taken-table.tsx';
import { type Order, useImport } from './import/use-import.ts';
import type { Waiting } from './import/waiting.ts';
import { WaitingUploads } from './import/waiting-uploads.tsx';
import { regionHref } from './links.ts';
import { ErrorNote, Loading } from './notes.tsx';
import ui from './ui.module.css';
import { useWho } from './use-who.ts';

const opening = () => <Loading>Opening the files…</Loading>;
const MappingStep = dynamic(() => import('./import/mapping-step.tsx').then((module) => module.MappingStep), {
  loading: opening,
});
const ReviewStep = dynamic(() => import('./import/review-step.tsx').then((module) => module.ReviewStep), {
  loading: opening,
});

interface Props {
  /** slug of the region to import into; null makes a new one, and asks for its name */
  region: string | null;
  /** an import that is under way already, of files that are not at hand here */
  runningJob?: string | null;
  /** the upload that the address names, or whose import is under way */
  openUpload?: string | null;
  /** uploads that wait for their import */
  waiting?: readonly Waiting[];
  /** whether the region has records, which files may extend, fill or revise */
  hasRecords?: boolean;
  /** stands beside the place for files until some are chosen */
  beside?: ReactNode;
}

/** Files in, report out: sending, seeing how they are understood, what they would change, and what became of each. */
export function ImportForm(props: Props) {
  const { region, runningJob = null, openUpload = null, waiting = [], hasRecords = false, beside } = props;
  const router = useRouter();
  const onTaken = useCallback(() => router.refresh(), [router]);
  const [by, setBy] = useWho();
  const [name, setName] = useState('');
  const onOrdered = useCallback((said: { name?: string }) => setName((now) => said.name ?? now), []);
  const flow = useImport({ region, runningJob, openUpload, onOrdered, onTaken });
  const order: Order = { by, name };
  const { state } = flow;
  const drop = <FileDrop onFiles={(files) => void flow.send(files)} />;
  switch (state.stage) {
    case 'sending':
      return <UploadBar sent={state.sent} total={state.total} onCancel={flow.cancelSending} />;
    case 'opening':
      return opening();
    case 'mapping':
      return (
        <>
          {state.cancelled && <Cancelled />}
          <MappingStep {...{ flow, region, order, setBy, setName }} comparable={hasRecords} />
        </>
      );
    case 'working':
      return (
        <JobBar progress={flow.job?.progress ?? null} trial={state.dryRun} onCancel={() => void flow.cancelJob()} />
      );
    case 'review':
      return (
        <ReviewStep
          outcome={state.outcome}
          files={flow.taken}
          onApply={(rule?: OverlapRule) => void flow.start({ ...order, rule }, false)}
          onBack={flow.backToFiles}
        />
      );
    case 'taken':
      return (
        <>
          <Taken slug={region ?? flow.madeRegion} outcome={state.outcome} />
          {drop}
        </>
      );
    case 'refused':
      return <Refused outcome={state.outcome} error={state.error} onAgain={flow.again} />;
    default:
      return (
        <>
          {state.cancelled && <Cancelled />}
          {state.error && <ErrorNote title="The files were not taken">{state.error}</ErrorNote>}
          <WaitingUploads waiting={waiting.filter(({ id }) => id !== openUpload)} onOpen={flow.open} />
          <div className={beside ? styles.beside : undefined}>
            {beside}
            {drop}
          </div>
        </>
      );
  }
}

function Cancelled() {
  return (
    <p role="status" className={styles.status}>
      Cancelled. Nothing was changed.
    </p>
  );
}

/** Opens the list of findings on the Records page. */
const FINDINGS = '?show=findings';

/** From this many files on they stand in one table, and the report of each below it is folded. */
const TABLE_FROM = 4;

function Taken({ slug, outcome }: { slug: string | null; outcome: ImportOutcome }) {
  const { findings, taken } = outcome;
  return (
    <div className={styles.outcome}>
      <div className={styles.outcomeHead}>
        <div role="status">
          <h2>{count(taken.length, 'file')} taken</h2>
          {findings && findings.findings > 0 && (
            <p>
              The checks found {count(findings.findings, 'thing')} to look at, at {count(findings.stations, 'station')}.
            </p>
          )}
        </div>
        {slug !== null && (
          <p className={styles.actions}>
            {findings && findings.findings > 0 && (
              <a className={ui.button} href={regionHref(slug, 'records') + FINDINGS}>
                Look at the findings
              </a>
            )}
            <a className={ui.primary} href={regionHref(slug, 'map')}>
              Open the map
            </a>
          </p>
        )}
      </div>
      {taken.length >= TABLE_FROM && <TakenTable files={taken} />}
      {taken.map((file) => (
        <Report
          key={file.importId}
          file={file}
          folded={taken.length >= TABLE_FROM}
          rejectedHref={slug && `/api/regions/${encodeURIComponent(slug)}/imports/${file.importId}/rejected`}
        />
      ))}
    </div>
  );
}

function Report({ folded, ...report }: { file: TakenFile; rejectedHref: string | null; folded: boolean }) {
  if (!folded) return <FileReport {...report} />;
  return (
    <details className={styles.one}>
      <summary>Report on {report.file.file}</summary>
      <div id={reportId(report.file)}>
        <FileReport {...report} />
      </div>
    </details>
  );
}

/** Files that a script sent were not taken: there is nothing to answer here, only to be read. */
function Refused({ outcome, error, onAgain }: { outcome: ImportOutcome; error: string | null; onAgain(): void }) {
  const { problems } = outcome;
  return (
    <div className={styles.outcome}>
      <div role="alert">
        <h2>The files were not taken</h2>
        <p className={styles.summary}>
          {problems.length === 0 && error ? error : 'Files are taken together or not at all: nothing was changed.'}
        </p>
      </div>
      {problems.map((problem) => (
        <section key={problem.file} aria-label={`${problem.file} was not taken`}>
          <h3>{problem.file}</h3>
          <ProblemNote problem={problem} answeredHere={false} />
        </section>
      ))}
      <p>
        <button type="button" className={ui.button} onClick={onAgain}>
          Choose files
        </button>
      </p>
    </div>
  );
}
