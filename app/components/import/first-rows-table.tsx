'use client';
import type { UnderstoodRow } from '@/lib/intake/types';
import { fixed } from '../format.ts';
import { ScrollFrame } from '../scroll-frame.tsx';
import type { Role } from './column-roles.ts';
import type { FirstRow } from './first-rows.ts';
import styles from './mapping.module.css';
import { unitText } from './unit-text.ts';
import { flagWords } from './words.ts';

interface Props {
  file: string;
  rows: readonly FirstRow[];
  unit: string | null;
  /** names of the columns; null for a document and for columns of fixed width */
  columns: readonly string[] | null;
  roles: readonly Role[];
  /** roles that a column may have, in words; none where they cannot be changed */
  offered: readonly { role: Role; words: string }[];
  /** what is wrong with the columns */
  asked: string | null;
  onRole(column: number, role: Role): void;
}

/** Columns shown of a wide file. */
const MOST_COLUMNS = 40;

/** The first rows as the program understood them, each beside the line that it came from; what a column holds is chosen
 *  above it. */
export function FirstRowsTable({ file, rows, unit, columns, roles, offered, asked, onRole }: Props) {
  // a column is known by its place alone
  const shown = columns?.slice(0, MOST_COLUMNS).map((name, column) => ({ name, column })) ?? null;
  const understood = rows.some(({ values }) => values.length > 0);
  const problems = rows.some(({ values }) => values.some(({ problem }) => problem !== null));
  return (
    <>
      {asked && (
        <p id="columns-asked" className={styles.asked}>
          {asked}
          {offered.length > 0 && ' Say above the columns what each of them holds.'}
        </p>
      )}
      {rows.length > 0 && (
        <ScrollFrame className={styles.rows} label={`First rows of ${file}`}>
          <table className={styles.firstRows}>
            <thead>
              {shown && understood && (
                <tr>
                  <th scope="colgroup" colSpan={problems ? 6 : 5}>
                    As understood
                  </th>
                  <th scope="colgroup" colSpan={shown.length} className={styles.raw}>
                    As it stands in the file
                  </th>
                </tr>
              )}
              <tr>
                <th scope="col">Row</th>
                {understood && (
                  <>
                    <th scope="col">Station</th>
                    <th scope="col">Date</th>
                    <th scope="col" className={styles.number}>
                      Value{unit && `, ${unitText(unit)}`}
                    </th>
                    <th scope="col">Flag</th>
                    {problems && <th scope="col">Not taken because</th>}
                  </>
                )}
                {shown?.map(({ name, column }) => (
                  <th key={column} scope="col" className={styles.raw} data-role={roles[column]}>
                    <span className={styles.columnName}>{name || `column ${column + 1}`}</span>
                    {offered.length > 0 && (
                      <select
                        aria-label={`Column ${column + 1}${name ? ` (${name})` : ''} holds`}
                        aria-invalid={asked !== null}
                        aria-describedby={asked ? 'columns-asked' : undefined}
                        value={roles[column]}
                        onChange={(event) => {
                          const role = offered.find((one) => one.role === event.target.value)?.role;
                          if (role) onRole(column, role);
                        }}
                      >
                        {offered.map(({ role, words }) => (
                          <option key={role} value={role}>
                            {words}
                          </option>
                        ))}
                      </select>
                    )}
                  </th>
                ))}
              </tr>
            </thead>
            <tbody>
              {rows.flatMap((row) =>
                linesOf(row).map(({ value, at, all }) => (
                  <tr key={`${row.line} ${at}`} data-problem={value?.problem ? true : undefined}>
                    {at === 0 && (
                      <td rowSpan={all} className={styles.number}>
                        {row.line === null ? '' : fixed(row.line)}
                      </td>
                    )}
                    {understood && <Understood value={value} problems={problems} />}
                    {at === 0 &&
                      shown?.map(({ column }) => (
                        <td key={column} rowSpan={all} className={styles.raw} data-role={roles[column]}>
                          {row.fields?.[column] ?? ''}
                        </td>
                      ))}
                  </tr>
                )),
              )}
            </tbody>
          </table>
        </ScrollFrame>
      )}
      {columns && columns.length > MOST_COLUMNS && (
        <p className={styles.more}>and {fixed(columns.length - MOST_COLUMNS)} more columns</p>
      )}
    </>
  );
}

/** A line takes a row of the table for each of its values, and one where nothing was understood of it. */
function linesOf({ values }: FirstRow): { value: UnderstoodRow | null; at: number; all: number }[] {
  const all = Math.max(1, values.length);
  return Array.from({ length: all }, (_, at) => ({ value: values[at] ?? null, at, all }));
}

function Understood({ value, problems }: { value: UnderstoodRow | null; problems: boolean }) {
  if (value === null) return <td colSpan={problems ? 5 : 4} />;
  const flags = flagWords(value.bits);
  return (
    <>
      <td>{value.station}</td>
      <td>{value.date ?? '–'}</td>
      <td className={styles.number}>{value.value ?? <em>{value.problem === null ? 'missing' : '–'}</em>}</td>
      <td>
        {value.flag && <code>{value.flag}</code>}
        {value.flag && flags && ' '}
        {flags && <span className={styles.meaning}>{flags}</span>}
      </td>
      {problems && <td className={styles.reason}>{value.problem}</td>}
    </>
  );
}
