import type { ImportProgress } from '@/lib/jobs/import-types';
import { count, fixed, percent } from '../format.ts';
import ui from '../ui.module.css';
import styles from './import.module.css';
import { sizeText } from './size-text.ts';

const STAGES: Record<ImportProgress['stage'], string> = {
  waiting: 'Waiting for its turn',
  recognising: 'Looking at the files',
  reading: 'Reading',
  storing: 'Storing',
  checking: 'Checking the records',
  done: 'Done',
};

interface BarProps {
  title: string;
  share: number;
  detail: string;
  onCancel?: () => void;
}

/** A bar with words, announced now and then and not at every percent. */
export function ProgressBar({ title, share, detail, onCancel }: BarProps) {
  return (
    <div className={styles.progress}>
      <p className={styles.progressTitle}>
        <strong role="status">{title}</strong>
        <span>{percent(share)}</span>
      </p>
      <progress value={share} max={1} aria-label={title} />
      <p className={styles.progressDetail}>{detail}</p>
      {onCancel && (
        <button type="button" className={ui.button} onClick={onCancel}>
          Cancel
        </button>
      )}
    </div>
  );
}

export function UploadBar({ sent, total, onCancel }: { sent: number; total: number; onCancel(): void }) {
  return (
    <ProgressBar
      title="Sending the files"
      share={total > 0 ? sent / total : 0}
      detail={`${sizeText(sent)} of ${sizeText(total)}`}
      onCancel={onCancel}
    />
  );
}

interface JobProps {
  progress: Partial<ImportProgress> | null;
  /** nothing is imported: the files are compared with what stands */
  trial?: boolean;
  onCancel(): void;
}

/** @param progress  as the job tells it; a job that has not begun yet tells nothing */
export function JobBar({ progress, trial = false, onCancel }: JobProps) {
  const { stage = 'waiting', file, fileNumber = 0, files = 0, rows = 0, rowsPerSecond = 0, share = 0 } = progress ?? {};
  const secondsLeft = progress?.secondsLeft ?? null;
  const details = [
    files > 1 ? `file ${fileNumber} of ${files}` : '',
    rows > 0 ? count(rows, 'row') : '',
    rowsPerSecond > 0 ? `${fixed(rowsPerSecond)} rows a second` : '',
    secondsLeft === null || stage === 'done' ? '' : timeWords(secondsLeft),
  ].filter(Boolean);
  return (
    <ProgressBar
      title={file ? `${STAGES[stage]} ${file}` : STAGES[stage]}
      share={share}
      detail={[...details, `the page may be closed: the ${trial ? 'comparison' : 'import'} goes on`].join(' · ')}
      onCancel={onCancel}
    />
  );
}

/** Example: 42 → "about 42 seconds left" */
export function timeWords(seconds: number): string {
  if (seconds < 90) return `about ${count(Math.max(1, Math.round(seconds)), 'second')} left`;
  return `about ${count(Math.round(seconds / 60), 'minute')} left`;
}
