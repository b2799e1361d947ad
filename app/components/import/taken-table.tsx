import type { ImportReport } from '@/lib/intake/types';
import type { TakenFile } from '@/lib/jobs/import-types';
import { fixed } from '../format.ts';
import { ScrollFrame } from '../scroll-frame.tsx';
import styles from './import.module.css';
import { unitText } from './unit-text.ts';
import { KIND_WORDS } from './words.ts';

/** Where the report on a file stands on the page. */
export const reportId = ({ importId }: TakenFile): string => `report-${importId}`;

/** Many files in one view: what became of each, in numbers. */
export function TakenTable({ files }: { files: readonly TakenFile[] }) {
  return (
    <ScrollFrame className={styles.scroll} label="Files taken">
      <table className={`${styles.table} ${styles.files}`}>
        <thead>
          <tr>
            <th scope="col">File</th>
            <th scope="col" className={styles.words}>
              What
            </th>
            <th scope="col">Stations</th>
            <th scope="col">Rows</th>
            <th scope="col">Rejected</th>
            <th scope="col">Values</th>
            <th scope="col">Missing</th>
            <th scope="col">First</th>
            <th scope="col">Last</th>
            <th scope="col">Notes</th>
          </tr>
        </thead>
        <tbody>
          {files.map((file) => (
            <tr key={file.importId}>
              <th scope="row">{file.file}</th>
              <td className={styles.words}>
                {file.report
                  ? `${KIND_WORDS[file.kind]} in ${unitText(file.report.unit)}`
                  : `${KIND_WORDS[file.kind]}: ${file.summary}`}
              </td>
              {file.report ? <Figures report={file.report} /> : <td colSpan={7} />}
              <td>{notesOf(file)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </ScrollFrame>
  );
}

function Figures({ report }: { report: ImportReport }) {
  const { stations } = report;
  const days = (key: 'first' | 'last') => stations.flatMap((station) => station[key] ?? []).sort();
  return (
    <>
      <td>{fixed(new Set(stations.map(({ code }) => code)).size)}</td>
      <td>{fixed(report.rows)}</td>
      <td data-attention={report.rejectedTotal > 0 || undefined}>{fixed(report.rejectedTotal)}</td>
      <td>{fixed(stations.reduce((sum, { values }) => sum + values, 0))}</td>
      <td>{fixed(stations.reduce((sum, { missing }) => sum + missing, 0))}</td>
      <td>{days('first')[0] ?? '–'}</td>
      <td>{days('last').at(-1) ?? '–'}</td>
    </>
  );
}

/** How many notes the report has, as a link to it. */
function notesOf(file: TakenFile) {
  const notes = new Set([...file.warnings, ...(file.report?.warnings ?? [])]).size;
  return notes === 0 ? '–' : <a href={`#${reportId(file)}`}>{fixed(notes)}</a>;
}
