'use client';
import { useState } from 'react';
import type { ImportOutcome, ImportProblem } from '@/lib/jobs/import-types';
import type { OverlapRule } from '@/lib/store/lay-parts';
import type { Revisions } from '@/lib/store/revisions';
import { count, fixed } from '../format.ts';
import ui from '../ui.module.css';
import { FileReport } from './report-view.tsx';
import styles from './review.module.css';
import { NO_REVISIONS, RevisionsTable, StationRevisionsTable, sumOf } from './revisions-table.tsx';
import { RULE_WORDS } from './words.ts';

interface Props {
  outcome: ImportOutcome;
  /** how many files are to be imported */
  files: number;
  onApply(rule: OverlapRule | undefined): void;
  onBack(): void;
}

/** What an import would do to the records that stand, and the choice of what becomes of unlike values. */
export function ReviewStep({ outcome, files: all, onApply, onBack }: Props) {
  const [rule, setRule] = useState<OverlapRule | null>(null);
  const files = comparedFiles(outcome);
  const sum = sumOf(files.map(({ revisions }) => revisions));
  const asks = sum.unlike > 0;
  // An import that was held up by unlike values tells of the files that have them, and of no other.
  const refused = outcome.problems.length > 0;
  return (
    <section className={styles.review} aria-label="What the import would do">
      <div role="status">
        <h2>What the import would do</h2>
        <p>
          {reviewWords(sum)} Nothing has been changed yet.
          {refused && all > files.length && (
            <> Nothing stands against the {count(all - files.length, 'other file')}, which would come along.</>
          )}
        </p>
      </div>
      {files.length > 0 && <RevisionsTable files={files} />}
      {files.map(({ file, revisions }) => (
        <StationRevisionsTable key={file} file={file} stations={revisions.stations} />
      ))}
      {asks && <RuleChoice sum={sum} rule={rule} onChoose={setRule} />}
      <p className={styles.actions}>
        <button
          type="button"
          className={ui.primary}
          disabled={asks && rule === null}
          onClick={() => onApply(asks ? (rule ?? undefined) : undefined)}
        >
          Import {count(all, 'file')}
        </button>
        <button type="button" className={ui.button} onClick={onBack}>
          Back to the files
        </button>
        {asks && rule === null && <span className={ui.hint}>Choose first what becomes of the unlike values.</span>}
      </p>
      {outcome.taken.length > 0 && (
        <details className={styles.reports}>
          <summary>Reports of the files</summary>
          {outcome.taken.map((file) => (
            <FileReport key={file.file} file={file} rejectedHref={null} />
          ))}
        </details>
      )}
    </section>
  );
}

interface Compared {
  file: string;
  revisions: Revisions;
}

/** The files that bring values, with what these do to those that stand. */
function comparedFiles({ taken, problems }: ImportOutcome): Compared[] {
  const read = taken.filter(({ kind }) => kind === 'flows');
  const refused = problems.filter((problem): problem is ImportProblem & Compared => problem.revisions !== undefined);
  return [...read, ...refused].map(({ file, revisions }) => ({ file, revisions: revisions ?? NO_REVISIONS }));
}

function reviewWords({ extended, filled, unlike }: Revisions): string {
  const parts = [
    extended > 0 ? `${count(extended, 'day')} would be added` : '',
    filled > 0 ? `${count(filled, 'day')} of gaps filled` : '',
  ].filter(Boolean);
  const gain = parts.length > 0 ? `${parts.join(' and ')}.` : 'No day would be added.';
  const unlikeWords =
    unlike > 0
      ? `${count(unlike, 'day')} ${unlike === 1 ? 'has' : 'have'} a value unlike the one that stands.`
      : 'No value that stands would change.';
  return `${gain.charAt(0).toUpperCase()}${gain.slice(1)} ${unlikeWords}`;
}

interface RuleProps {
  sum: Revisions;
  rule: OverlapRule | null;
  onChoose(rule: OverlapRule): void;
}

const RULES: readonly OverlapRule[] = ['keep', 'take-new', 'take-where-provisional'];

function RuleChoice({ sum, rule, onChoose }: RuleProps) {
  const effects: Record<OverlapRule, string> = {
    keep: 'no value changes',
    'take-new': `${count(sum.unlike, 'value')} would change`,
    'take-where-provisional': `${count(sum.unlikeProvisional, 'value')} would change, ${fixed(sum.unlike - sum.unlikeProvisional)} would stay`,
  };
  return (
    <fieldset className={styles.rules}>
      <legend>What becomes of days whose values are unlike?</legend>
      {RULES.map((one) => (
        <label key={one} className={ui.check}>
          <input type="radio" name="rule" checked={rule === one} onChange={() => onChoose(one)} />
          <span>
            {RULE_WORDS[one]} <span className={styles.effect}>({effects[one]})</span>
          </span>
        </label>
      ))}
      <p className={ui.hint}>Whatever you choose can be undone: both values are kept.</p>
    </fieldset>
  );
}
