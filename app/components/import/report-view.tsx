import type { ImportReport } from '@/lib/intake/types';
import type { TakenFile } from '@/lib/jobs/import-types';
import { count, fixed, significant } from '../format.ts';
import { ScrollFrame } from '../scroll-frame.tsx';
import styles from './import.module.css';
import { revisionWords } from './revisions-table.tsx';
import { unitText } from './unit-text.ts';
import { LAYOUT_WORDS, QUANTITY_WORDS } from './words.ts';

/** Rejected rows shown before the CSV file has to be opened. */
const SHOWN_ROWS = 10;
const SHOWN_STATIONS = 12;

/** What became of one file.
 *  @param rejectedHref  where all rejected rows can be had; null while nothing has been imported */
export function FileReport({ file, rejectedHref }: { file: TakenFile; rejectedHref: string | null }) {
  const { report } = file;
  return (
    <section className={styles.report} aria-label={`Report on ${file.file}`}>
      <h3>{file.file}</h3>
      <p className={styles.summary}>{report ? flowSummary(report) : file.summary}</p>
      {report && <Counts report={report} rejectedHref={rejectedHref} />}
      {file.revisions && revisionWords(file.revisions) && (
        <p className={styles.summary}>Against what stood before: {revisionWords(file.revisions)}.</p>
      )}
      {[...new Set([...file.warnings, ...(report?.warnings ?? [])])].map((warning) => (
        <p key={warning} className={styles.caution}>
          <strong>Note</strong> {warning}
        </p>
      ))}
      {report && <Rejected report={report} href={rejectedHref} />}
      {report && <Stations report={report} />}
    </section>
  );
}

function flowSummary(report: ImportReport): string {
  const quantities = [...new Set(report.stations.map(({ quantity = 'flow' }) => QUANTITY_WORDS[quantity]))];
  const what =
    quantities.length > 1
      ? `Daily values of ${quantities.join(', ')}`
      : `Daily ${report.mapping.quantity && report.mapping.quantity !== 'flow' ? QUANTITY_WORDS[report.mapping.quantity] : 'flows'}`;
  return `${what} in ${unitText(report.unit)}: ${LAYOUT_WORDS[report.layout]}.`;
}

function Counts({ report, rejectedHref }: { report: ImportReport; rejectedHref: string | null }) {
  return (
    <dl className={styles.counts}>
      <div>
        <dt>rows read</dt>
        <dd>{fixed(report.rows)}</dd>
      </div>
      <div>
        <dt>accepted</dt>
        <dd>{fixed(report.accepted)}</dd>
      </div>
      <div data-attention={report.rejectedTotal > 0 || undefined}>
        <dt>rejected</dt>
        <dd>
          {report.rejectedTotal > 0 && rejectedHref ? (
            <a href={rejectedHref}>{fixed(report.rejectedTotal)}</a>
          ) : (
            fixed(report.rejectedTotal)
          )}
        </dd>
      </div>
      <div>
        <dt>stations</dt>
        <dd>{fixed(report.stations.length)}</dd>
      </div>
      <div>
        <dt>values</dt>
        <dd>{fixed(report.stations.reduce((sum, station) => sum + station.values, 0))}</dd>
      </div>
    </dl>
  );
}

function Rejected({ report, href }: { report: ImportReport; href: string | null }) {
  if (report.rejectedTotal === 0) return null;
  const rows = report.rejected.slice(0, SHOWN_ROWS);
  return (
    <ScrollFrame className={styles.scroll} label={`Rejected rows of ${report.file}`}>
      <table className={styles.table}>
        <caption>
          {report.rejectedTotal > rows.length
            ? `The first ${rows.length} of ${count(report.rejectedTotal, 'rejected row')}. `
            : `${count(report.rejectedTotal, 'rejected row')}. `}
          {href && (
            <a href={href} download>
              All of them as CSV
            </a>
          )}
        </caption>
        <thead>
          <tr>
            <th scope="col">Row</th>
            <th scope="col" className={styles.words}>
              Text
            </th>
            <th scope="col" className={styles.words}>
              Why
            </th>
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr key={row.row}>
              <td>{fixed(row.row)}</td>
              <td className={styles.code}>{row.text}</td>
              <td className={styles.reason}>{row.reason}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </ScrollFrame>
  );
}

function Stations({ report }: { report: ImportReport }) {
  const { stations } = report;
  return (
    <details className={styles.stations} open={stations.length <= SHOWN_STATIONS}>
      <summary>{count(stations.length, 'station')} in the file</summary>
      <ScrollFrame className={styles.scroll} label={`Stations in ${report.file}`}>
        <table className={styles.table}>
          <thead>
            <tr>
              <th scope="col">Station</th>
              <th scope="col">Values</th>
              <th scope="col">Missing</th>
              <th scope="col">First</th>
              <th scope="col">Last</th>
              <th scope="col">Gaps</th>
              <th scope="col">Longest gap, days</th>
              <th scope="col">Doubled days</th>
              <th scope="col">Zeros</th>
              <th scope="col">Least, {unitText(report.unit)}</th>
              <th scope="col">Most, {unitText(report.unit)}</th>
            </tr>
          </thead>
          <tbody>
            {stations.map((station) => (
              <tr key={`${station.code} ${station.quantity ?? 'flow'}`}>
                <th scope="row">
                  {station.code}
                  {station.quantity && station.quantity !== 'flow' && `, ${QUANTITY_WORDS[station.quantity]}`}
                </th>
                <td>{fixed(station.values)}</td>
                <td>{fixed(station.missing)}</td>
                <td>{station.first ?? '–'}</td>
                <td>{station.last ?? '–'}</td>
                <td>{fixed(station.gaps)}</td>
                <td>{fixed(station.longestGapDays)}</td>
                <td>{fixed(station.duplicates)}</td>
                <td>{fixed(station.zeros)}</td>
                <td>{significant(station.min)}</td>
                <td>{significant(station.max)}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </ScrollFrame>
    </details>
  );
}
