'use client';
import { useCallback, useRef, useState } from 'react';
import type { ImportChoices, ImportOutcome } from '@/lib/jobs/import-types';
import { type Answers, withAnswers } from './answers.ts';
import { createRegion, UploadCancelled, type UploadHandle, upload } from './upload.ts';
import { type ImportJob, useJob } from './use-job.ts';

/** Where an import on the screen stands. */
export type ImportState =
  | { stage: 'choosing'; error: string | null }
  | { stage: 'sending'; sent: number; total: number }
  | { stage: 'working'; jobId: string }
  | { stage: 'taken'; outcome: ImportOutcome }
  | { stage: 'refused'; outcome: ImportOutcome; error: string | null }
  | { stage: 'cancelled' };

interface Options {
  /** null: a region is made first, of the name given to `start` */
  region: string | null;
  /** a job that was running when the page was opened */
  runningJob: string | null;
  /** called when files were taken */
  onTaken(slug: string): void;
}

/** One import from chosen files to report, with answers and further tries in between. */
export function useImport({ region, runningJob, onTaken }: Options) {
  const [state, setState] = useState<ImportState>(
    runningJob ? { stage: 'working', jobId: runningJob } : { stage: 'choosing', error: null },
  );
  const [files, setFiles] = useState<File[]>([]);
  const [slug, setSlug] = useState(region);
  const choices = useRef<ImportChoices>({});
  const handle = useRef<UploadHandle | null>(null);

  const onOver = useCallback(
    (job: ImportJob) => {
      const outcome = job.result ?? { taken: [], problems: [] };
      if (job.state === 'cancelled') setState({ stage: 'cancelled' });
      else if (job.state === 'failed') setState({ stage: 'refused', outcome, error: job.error });
      else {
        setState({ stage: 'taken', outcome });
        setFiles([]);
        if (slug) onTaken(slug);
      }
    },
    [slug, onTaken],
  );
  const job = useJob(state.stage === 'working' ? state.jobId : null, onOver);

  const send = async (target: string, sending: readonly File[]) => {
    const total = sending.reduce((sum, file) => sum + file.size, 0);
    setState({ stage: 'sending', sent: 0, total });
    handle.current = upload(target, sending, choices.current, (sent, all) =>
      setState((now) => (now.stage === 'sending' ? { stage: 'sending', sent, total: all } : now)),
    );
    try {
      setState({ stage: 'working', jobId: await handle.current.job });
    } catch (error) {
      if (error instanceof UploadCancelled) setState({ stage: 'cancelled' });
      else setState({ stage: 'choosing', error: error instanceof Error ? error.message : String(error) });
    }
  };

  return {
    state,
    job,
    files,
    slug,
    /** adds files; one of the same name takes the place of the earlier one */
    addFiles(more: readonly File[]) {
      const names = new Set(more.map((file) => file.name));
      setFiles((now) => [...now.filter((file) => !names.has(file.name)), ...more]);
      if (state.stage === 'taken' || state.stage === 'cancelled') setState({ stage: 'choosing', error: null });
    },
    removeFile: (file: File) => setFiles((now) => now.filter((other) => other !== file)),
    async start(first: ImportChoices, name?: string) {
      choices.current = first;
      try {
        const target = slug ?? (await createRegion(name ?? ''));
        setSlug(target);
        await send(target, files);
      } catch (error) {
        setState({ stage: 'choosing', error: error instanceof Error ? error.message : String(error) });
      }
    },
    async retry(answers: Answers) {
      if (state.stage !== 'refused' || !slug) return;
      choices.current = withAnswers(choices.current, state.outcome.problems, answers);
      const kept = files.filter((file) => !answers[file.name]?.leaveOut);
      setFiles(kept);
      if (kept.length > 0) await send(slug, kept);
      else setState({ stage: 'choosing', error: null });
    },
    async cancel() {
      if (state.stage === 'sending') handle.current?.cancel();
      else if (state.stage === 'working') {
        await fetch(`/api/jobs/${encodeURIComponent(state.jobId)}`, { method: 'DELETE' }).catch(() => null);
      }
    },
    again: () => setState({ stage: 'choosing', error: null }),
  };
}
