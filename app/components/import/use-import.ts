'use client';
import { useCallback, useEffect, useRef, useState } from 'react';
import type { ImportChoices, ImportOutcome, ImportProblem } from '@/lib/jobs/import-types';
import type { UploadedFile, UploadView } from '@/lib/jobs/upload-types';
import * as client from './upload-client.ts';
import { fetchJob, type ImportJob, isOver, useJob } from './use-job.ts';
import { wordsOf } from './use-looks.ts';

/** Where an import on the screen stands. */
export type ImportState =
  | { stage: 'choosing'; error: string | null; cancelled?: boolean }
  | { stage: 'sending'; sent: number; total: number }
  | { stage: 'opening' }
  | { stage: 'mapping'; error: string | null; cancelled?: boolean }
  | { stage: 'working'; jobId: string; dryRun: boolean }
  /** a trial has told what would come of it, or unlike values wait for a rule */
  | { stage: 'review'; outcome: ImportOutcome }
  /** files that are no longer at hand were not taken */
  | { stage: 'refused'; outcome: ImportOutcome; error: string | null }
  | { stage: 'taken'; outcome: ImportOutcome };

interface Options {
  /** null: the import makes a region */
  region: string | null;
  /** a job that was running when the page was opened */
  runningJob: string | null;
  /** an upload that waits, to go on with */
  openUpload: string | null;
  /** called with the name that the region is to have, where the upload says it */
  onOrdered(order: { name?: string }): void;
  /** called when files were taken */
  onTaken(): void;
}

/** What of an import is chosen beside its files. */
export interface Order {
  by: string;
  /** of the region to be made */
  name: string;
  rule?: ImportChoices['rule'];
}

/** One import from chosen files to report: sending, looking, trying, and what became of it. The files stay on the server
 *  in between, and the address names them, so that the page may be closed and opened again. */
export function useImport({ region, runningJob, openUpload, onOrdered, onTaken }: Options) {
  const [state, setState] = useState<ImportState>(() =>
    openUpload
      ? { stage: 'opening' }
      : runningJob
        ? { stage: 'working', jobId: runningJob, dryRun: false }
        : { stage: 'choosing', error: null },
  );
  const [upload, setUpload] = useState<UploadView | null>(null);
  const [leftOut, setLeftOut] = useState<ReadonlySet<string>>(new Set());
  const [refusals, setRefusals] = useState<Record<string, ImportProblem>>({});
  const [madeRegion, setMadeRegion] = useState<string | null>(null);
  const sending = useRef<client.Sending | null>(null);

  const setFiles = useCallback((change: (now: readonly UploadedFile[]) => readonly UploadedFile[]) => {
    setUpload((now) => now && { ...now, files: [...change(now.files)] });
  }, []);

  const show = useCallback((view: UploadView | null) => {
    setUpload(view);
    nameInAddress(view?.id ?? null);
  }, []);

  const onOver = useCallback(
    (job: ImportJob, dryRun: boolean, view: UploadView | null) => {
      const outcome = job.result ?? { taken: [], problems: [] };
      const lost = job.state === 'failed' && job.result === null ? (job.error ?? 'The import broke off.') : null;
      if (job.state === 'cancelled') {
        setState({ stage: view ? 'mapping' : 'choosing', error: null, cancelled: true });
      } else if (job.state === 'failed') {
        // What becomes of unlike values is chosen in the review: it holds nothing up among the files.
        const refused = outcome.problems.filter((problem) => !asksForRule(problem));
        setRefusals(Object.fromEntries(refused.map((problem) => [problem.file, problem])));
        const toReview = outcome.problems.length > 0 && refused.length === 0;
        if (!view) setState({ stage: 'refused', outcome, error: job.error });
        else if (toReview) setState({ stage: 'review', outcome });
        else setState({ stage: 'mapping', error: lost });
      } else if (dryRun) {
        setState({ stage: 'review', outcome });
      } else {
        setState({ stage: 'taken', outcome });
        show(null);
        setRefusals({});
        setLeftOut(new Set());
        if (region === null) void slugOfRegion(job.result?.regionId ?? null).then(setMadeRegion);
        onTaken();
      }
    },
    [region, onTaken, show],
  );
  const working = state.stage === 'working' ? state : null;
  const job = useJob(working?.jobId ?? null, (over) => onOver(over, working?.dryRun ?? false, upload));

  const [toOpen, setToOpen] = useState(openUpload);
  useEffect(() => {
    if (toOpen === null) return;
    let gone = false;
    const open = async () => {
      const view = await client.fetchUpload(toOpen);
      const last = view.job && (await fetchJob(view.job.id));
      if (gone) return;
      setToOpen(null);
      show(view);
      setLeftOut(new Set(view.leaveOut));
      onOrdered({ name: view.job?.name ?? view.archive?.name });
      if (!last || !view.job) setState({ stage: 'mapping', error: null });
      else if (isOver(last)) onOver(last, view.job.dryRun, view);
      else setState({ stage: 'working', jobId: last.id, dryRun: view.job.dryRun });
    };
    open().catch((error: unknown) => {
      if (gone) return;
      setToOpen(null);
      nameInAddress(null);
      setState({ stage: 'choosing', error: wordsOf(error) });
    });
    return () => {
      gone = true;
    };
  }, [toOpen, show, onOver, onOrdered]);

  const fail = (error: string) => setState((now) => (now.stage === 'mapping' ? { ...now, error } : now));

  /** The stations that flows may name have changed: which files are to be looked at anew, the server knows. */
  const refresh = async () => {
    if (!upload) return;
    const view = await client.fetchUpload(upload.id).catch(() => null);
    if (view) setUpload(view);
  };

  return {
    ...{ state, job, upload, setFiles, leftOut, refusals, madeRegion },
    /** how many files are to be imported */
    taken: numberTaken(upload, leftOut),
    /** sends files: those of an upload that waits are joined by them */
    async send(files: readonly File[]) {
      const address = upload ? client.moreFilesAddress(upload.id) : client.uploadsAddress(region);
      const total = files.reduce((sum, file) => sum + file.size, 0);
      setState({ stage: 'sending', sent: 0, total });
      sending.current = client.sendFiles(address, files, (sent, all) =>
        setState((now) => (now.stage === 'sending' ? { stage: 'sending', sent, total: all } : now)),
      );
      try {
        const view = await sending.current.upload;
        show(view);
        if (view.archive) onOrdered(view.archive);
        setState({ stage: 'mapping', error: null });
      } catch (error) {
        const cancelled = error instanceof client.UploadCancelled;
        setState({ stage: upload ? 'mapping' : 'choosing', error: cancelled ? null : wordsOf(error), cancelled });
      }
    },
    /** goes on with an upload that waits */
    open(id: string) {
      setState({ stage: 'opening' });
      setToOpen(id);
    },
    cancelSending: () => sending.current?.cancel(),
    async leaveOut(file: string, out: boolean) {
      const next = out ? [...leftOut, file] : [...leftOut].filter((other) => other !== file);
      setLeftOut(new Set(next));
      if (!upload) return;
      try {
        await client.leaveOut(upload.id, next);
        // flows may name other stations now
        if (upload.files.some((one) => one.file === file && one.kind === 'registry')) await refresh();
      } catch (error) {
        fail(wordsOf(error));
      }
    },
    refresh,
    /** what an import said of these files is of no account once they are read otherwise */
    forgetRefusals(files: readonly string[]) {
      setRefusals((now) => Object.fromEntries(Object.entries(now).filter(([file]) => !files.includes(file))));
    },
    fail,
    /** starts the import, or a trial of it that changes nothing */
    async start({ by, name, rule }: Order, dryRun: boolean) {
      if (!upload) return;
      setRefusals({});
      // A trial counts what is unlike and needs no rule for it; that which changes nothing stands for all.
      const asked = dryRun ? 'keep' : rule;
      const choices: ImportChoices = { ...(by ? { by } : {}), ...(asked ? { rule: asked } : {}) };
      const target = region === null ? { region: { name } } : {};
      try {
        const jobId = await client.startImport(upload.id, { choices, leaveOut: [...leftOut], dryRun, ...target });
        setState({ stage: 'working', jobId, dryRun });
      } catch (error) {
        setState({ stage: 'mapping', error: wordsOf(error) });
      }
    },
    async cancelJob() {
      if (!working) return;
      // a job that cannot be cancelled any more tells its end itself
      await client.cancelJob(working.jobId).catch(() => undefined);
    },
    async giveUp() {
      show(null);
      setRefusals({});
      setLeftOut(new Set());
      setState({ stage: 'choosing', error: null });
      // what could not be taken away now goes a day later
      if (upload) await client.discardUpload(upload.id).catch(() => undefined);
    },
    backToFiles: () => setState({ stage: 'mapping', error: null }),
    again: () => setState({ stage: 'choosing', error: null }),
  };
}

function numberTaken(upload: UploadView | null, leftOut: ReadonlySet<string>): number {
  if (!upload) return 0;
  const { archive, files } = upload;
  return archive
    ? archive.stations + archive.layers + archive.flows
    : files.filter(({ file }) => !leftOut.has(file)).length;
}

const asksForRule = ({ problem }: ImportProblem): boolean => problem?.needs === 'revise';

/** The address names the upload, so that a page opened anew goes on with it. */
function nameInAddress(id: string | null): void {
  const address = new URL(window.location.href);
  if (id === null) address.searchParams.delete('upload');
  else address.searchParams.set('upload', id);
  window.history.replaceState(null, '', address);
}

/** Slug of the region that an import has made. */
async function slugOfRegion(id: number | null): Promise<string | null> {
  const response = await fetch('/api/regions', { cache: 'no-store' }).catch(() => null);
  if (!response?.ok) return null;
  return ((await response.json()) as { id: number; slug: string }[]).find((region) => region.id === id)?.slug ?? null;
}
