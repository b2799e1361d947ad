'use client';
import { useId } from 'react';
import { FLOW_UNITS, type FlowUnit } from '@/lib/intake/types';
import type { ImportProblem } from '@/lib/jobs/import-types';
import { count, fixed } from '../format.ts';
import ui from '../ui.module.css';
import { type Answer, asksUnit, isAsked } from './answers.ts';
import { ColumnChoice } from './column-choice.tsx';
import { FilePreview } from './file-preview.tsx';
import styles from './import.module.css';

interface Props {
  problem: ImportProblem;
  answer: Answer | undefined;
  /** how many other files take the answer as well */
  alike: number;
  onAnswer(answer: Answer): void;
}

/** Rows at fault that are listed. */
const SHOWN_ROWS = 10;

/** Why one file was not taken: row, value, remedy, and a question where an answer would do. */
export function ProblemView({ problem, answer = {}, alike, onAnswer }: Props) {
  const { file, problem: detail, inspection } = problem;
  const give = (part: Answer) => onAnswer({ ...answer, ...part });
  return (
    <section className={styles.problem} aria-label={`${file} was not taken`}>
      <h3>{file}</h3>
      {detail ? (
        <p>
          {detail.row !== undefined && <>Row {fixed(detail.row)}: </>}
          {sentence(detail.message)}
          {detail.value !== undefined && (
            <>
              {' '}
              (<code>{detail.value}</code>)
            </>
          )}
          .{!isAskedHere(detail.needs) && <strong> {sentence(detail.remedy)}</strong>}
        </p>
      ) : (
        <p>{problem.message}</p>
      )}
      {detail?.rows && detail.rows.length > 0 && <RowsAtFault rows={detail.rows} />}
      {!answer.leaveOut && isAsked(problem) && (
        <>
          {inspection && inspection.preview.length > 0 && (
            <FilePreview header={inspection.header} rows={inspection.preview} name={file} />
          )}
          <Question problem={problem} answer={answer} give={give} />
          {alike > 0 && (
            <p className={ui.hint}>
              {count(alike, 'other file')} laid out like this {alike === 1 ? 'takes' : 'take'} the same answer, unless
              it is given another.
            </p>
          )}
        </>
      )}
      <label className={ui.check}>
        <input
          type="checkbox"
          checked={answer.leaveOut ?? false}
          onChange={(event) => give({ leaveOut: event.target.checked })}
        />
        Leave this file out of the next try
      </label>
    </section>
  );
}

const sentence = (words: string): string => words.charAt(0).toUpperCase() + words.slice(1);

/** Needs that the form under the message asks for itself: the remedy would say it twice, in words for the batch command. */
const isAskedHere = (needs: NonNullable<ImportProblem['problem']>['needs']): boolean =>
  needs !== undefined && ['unit', 'station', 'date-order', 'mapping'].includes(needs);

function RowsAtFault({ rows }: { rows: NonNullable<NonNullable<ImportProblem['problem']>['rows']> }) {
  return (
    <ul className={styles.faults}>
      {rows.slice(0, SHOWN_ROWS).map((row) => (
        <li key={`${row.row} ${row.reason}`}>
          Row {fixed(row.row)}: {row.reason} <code>{row.text}</code>
        </li>
      ))}
      {rows.length > SHOWN_ROWS && <li>and {count(rows.length - SHOWN_ROWS, 'more row')}</li>}
    </ul>
  );
}

function Question({ problem, answer, give }: { problem: ImportProblem; answer: Answer; give(part: Answer): void }) {
  const id = useId();
  switch (problem.problem?.needs) {
    case 'unit':
      return (
        <label className={ui.label} htmlFor={id}>
          Unit of the flows
          <UnitSelect id={id} value={answer.unit} onChange={(unit) => give({ unit })} />
        </label>
      );
    case 'station':
      return (
        <label className={ui.label} htmlFor={id}>
          Code of the station
          <input
            id={id}
            className={ui.input}
            value={answer.station ?? ''}
            onChange={(event) => give({ station: event.target.value })}
          />
          <span className={ui.hint}>As in the region’s station list; leading zeros count.</span>
        </label>
      );
    case 'date-order':
      return <DateOrder answer={answer} give={give} />;
    case 'mapping':
      return (
        <ColumnChoice
          candidates={problem.inspection?.valueCandidates ?? []}
          chosen={answer.value}
          onChoose={(value) => give({ value })}
        >
          {asksUnit(problem) && (
            <label className={ui.label} htmlFor={id}>
              Unit of the flows
              <UnitSelect id={id} value={answer.unit} onChange={(unit) => give({ unit })} />
            </label>
          )}
        </ColumnChoice>
      );
    case 'revise':
      return (
        <label className={ui.check}>
          <input
            type="checkbox"
            checked={answer.revise ?? false}
            onChange={(event) => give({ revise: event.target.checked })}
          />
          Take the new values where they differ from those that stand (this can be undone)
        </label>
      );
    default:
      return null;
  }
}

const UNIT_WORDS: Record<FlowUnit, string> = {
  'm3/s': 'm³/s, cubic metres a second',
  'L/s': 'L/s, litres a second',
  'ft3/s': 'ft³/s, cubic feet a second',
  'ML/d': 'ML/d, megalitres a day',
  'Mgal/d': 'Mgal/d, million US gallons a day',
  'acre-ft/d': 'acre-ft/d, acre-feet a day',
  'mm/d': 'mm/d, depth over the drainage area',
};

interface UnitSelectProps {
  id: string;
  value: FlowUnit | undefined;
  onChange(unit: FlowUnit | undefined): void;
}

export function UnitSelect({ id, value, onChange }: UnitSelectProps) {
  return (
    <select
      id={id}
      className={ui.select}
      value={value ?? ''}
      onChange={(event) => onChange(FLOW_UNITS.find((unit) => unit === event.target.value))}
    >
      <option value="">choose…</option>
      {FLOW_UNITS.map((unit) => (
        <option key={unit} value={unit}>
          {UNIT_WORDS[unit]}
        </option>
      ))}
    </select>
  );
}

const ORDERS = [
  { order: 'dmy', words: 'day, month, year: 3/4/2010 is 3 April' },
  { order: 'mdy', words: 'month, day, year: 3/4/2010 is 4 March' },
  { order: 'ymd', words: 'year, month, day: 2010/3/4 is 4 March' },
] as const;

function DateOrder({ answer, give }: { answer: Answer; give(part: Answer): void }) {
  const name = useId();
  return (
    <fieldset className={styles.choices}>
      <legend>Order of the dates</legend>
      {ORDERS.map(({ order, words }) => (
        <label key={order} className={ui.check}>
          <input
            type="radio"
            name={name}
            checked={answer.dateOrder === order}
            onChange={() => give({ dateOrder: order })}
          />
          {words}
        </label>
      ))}
    </fieldset>
  );
}
