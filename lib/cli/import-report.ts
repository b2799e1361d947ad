import type { ImportReport } from '../intake/types.ts';
import type { ImportOutcome, TakenFile } from '../jobs/import-types.ts';
import { rejectedPath } from '../jobs/rejected-rows.ts';

/** Rejected rows shown in words; all of them are in the file that the report names. */
const SHOWN = 5;

const reportsOf = (outcome: ImportOutcome): ImportReport[] => outcome.taken.flatMap(({ report }) => report ?? []);

const fileOfRejected = ({ rejectedFile }: ImportReport): string | null =>
  rejectedFile === null ? null : rejectedPath(rejectedFile);

/** The report for programs: one entry a flow file, counts of that file, values as imported. Changed only by adding. */
export function reportJson(outcome: ImportOutcome): string {
  const files = reportsOf(outcome).map((report) => ({
    file: report.file,
    layout: report.layout,
    unit: report.unit,
    rows: report.rows,
    accepted: report.accepted,
    rejectedTotal: report.rejectedTotal,
    rejectedFile: fileOfRejected(report),
    rejected: report.rejected.map(({ row, text, reason }) => ({ row, text, reason })),
    stations: report.stations.map(({ code, values, missing, first, last, zeros, min, max }) => ({
      ...{ code, values, missing, first, last, zeros, min, max },
    })),
  }));
  return `${JSON.stringify({ files }, null, 2)}\n`;
}

/** The report for people. */
export function reportText(outcome: ImportOutcome): string {
  return outcome.taken.map(fileText).join('');
}

function fileText({ file, kind, summary, report, warnings }: TakenFile): string {
  const lines = [`${file}: ${kind}, ${summary}`, ...(report ? flowLines(report) : [])];
  return `${[...lines, ...warnings.map((warning) => `  ${warning}`)].join('\n')}\n`;
}

function flowLines(report: ImportReport): string[] {
  const { layout, unit, rows, accepted, rejectedTotal } = report;
  const rejected = report.rejected
    .slice(0, SHOWN)
    .map(({ row, text, reason }) => `  row ${row} was rejected: ${reason} (“${text}”)`);
  const all = fileOfRejected(report);
  return [
    `  layout ${layout}, ${unit}; ${rows} rows read, ${accepted} accepted, ${rejectedTotal} rejected`,
    ...report.stations.map(
      ({ code, values, missing, first, last, gaps, longestGapDays }) =>
        `  ${code}: ${values} values${first === null ? '' : `, ${first} to ${last}`}, ${missing} missing, ${gaps} gaps${
          gaps > 0 ? ` (longest ${longestGapDays} days)` : ''
        }`,
    ),
    ...rejected,
    ...(all === null ? [] : [`  all rejected rows: ${all}`]),
  ];
}
