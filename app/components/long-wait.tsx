import { ProgressBar, timeWords } from './import/job-progress.tsx';
import { ErrorNote, Loading } from './notes.tsx';
import ui from './ui.module.css';
import type { LongResult } from './use-long-result.ts';

interface Props {
  answer: Omit<LongResult<unknown>, 'value' | 'valueOf'>;
  /** what is under way. Example: "Shuffling the years" */
  title: string;
  /** what could not be done. Example: "Chance could not be told" */
  failed: string;
  /** in few words: the full account stands elsewhere on the page */
  brief?: boolean;
}

/** What stands in place of a long answer, or above an older one, until it is there: progress that can be cancelled, that it
 *  was cancelled, or why it failed. Nothing once it is there. */
export function LongWait({ answer, title, failed, brief = false }: Props) {
  const { pending, progress, problem, cancelling, cancelled, cancel, retry } = answer;
  if (brief) return problem !== null ? `${failed}.` : cancelled ? `${title}: cancelled.` : pending ? `${title}…` : null;
  if (problem !== null) {
    return (
      <ErrorNote title={failed}>
        <p>{problem}</p>
        <Again onClick={retry}>Try again</Again>
      </ErrorNote>
    );
  }
  if (cancelled) {
    return (
      <p role="status">
        {title}: cancelled. <Again onClick={retry}>Compute it after all</Again>
      </p>
    );
  }
  if (progress !== null) {
    const left = progress.secondsLeft === null ? '' : timeWords(progress.secondsLeft);
    return (
      <ProgressBar
        title={progress.share === null ? `${title}: waiting for its turn` : title}
        share={progress.share ?? 0}
        detail={
          cancelling
            ? 'stopping, once the part in hand is done'
            : [left, 'the page may be used meanwhile'].filter(Boolean).join(' · ')
        }
        onCancel={cancelling ? undefined : cancel}
      />
    );
  }
  return pending ? <Loading>{title}…</Loading> : null;
}

function Again({ onClick, children }: { onClick(): void; children: string }) {
  return (
    <button type="button" className={ui.plain} onClick={onClick}>
      {children}
    </button>
  );
}
