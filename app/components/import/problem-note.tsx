import type { ReactNode } from 'react';
import type { ImportProblem } from '@/lib/jobs/import-types';
import type { PreviewProblem } from '@/lib/jobs/upload-types';
import { count, fixed } from '../format.ts';
import { sentence } from './asked.ts';
import styles from './mapping.module.css';

interface Props {
  problem: PreviewProblem | ImportProblem;
  /** the remedy is said in words for the batch command: leave it away where the screen asks itself */
  answeredHere: boolean;
  children?: ReactNode;
}

/** Rows at fault that are listed. */
const SHOWN_ROWS = 10;

/** Why a file cannot be taken as it stands: row, value, remedy, and every row at fault. */
export function ProblemNote({ problem: { message, problem }, answeredHere, children }: Props) {
  return (
    <div className={styles.problem}>
      {problem ? (
        <p>
          {problem.row !== undefined && <>Row {fixed(problem.row)}: </>}
          {sentence(problem.message).replace(/\.$/, '')}
          {problem.value !== undefined && (
            <>
              {' '}
              (<code>{problem.value}</code>)
            </>
          )}
          .{!answeredHere && <strong> {sentence(problem.remedy)}</strong>}
        </p>
      ) : (
        <p>{message}</p>
      )}
      {problem?.rows && problem.rows.length > 0 && (
        <ul>
          {problem.rows.slice(0, SHOWN_ROWS).map((row) => (
            <li key={`${row.row} ${row.reason}`}>
              Row {fixed(row.row)}: {row.reason} <code>{row.text}</code>
            </li>
          ))}
          {problem.rows.length > SHOWN_ROWS && <li>and {count(problem.rows.length - SHOWN_ROWS, 'more row')}</li>}
        </ul>
      )}
      {children}
    </div>
  );
}
