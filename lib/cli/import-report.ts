import type { ImportReport, Quantity } from '../intake/types.ts';
import type { ImportOutcome, TakenFile } from '../jobs/import-types.ts';
import { rejectedPath } from '../jobs/rejected-rows.ts';
import { quantityWords } from '../series/quantities.ts';
import type { Revisions } from '../store/revisions.ts';

/** Rejected rows shown in words; all of them are in the file that the report names. */
const SHOWN = 5;

const reportsOf = (outcome: ImportOutcome): ImportReport[] => outcome.taken.flatMap(({ report }) => report ?? []);

const fileOfRejected = ({ rejectedFile }: ImportReport): string | null =>
  rejectedFile === null ? null : rejectedPath(rejectedFile);

/** The report for programs: one entry a flow file, counts of that file, values as imported. Changed only by adding. */
export function reportJson(outcome: ImportOutcome): string {
  const { findings } = outcome;
  const taken = outcome.taken.filter(({ report }) => report !== null);
  const files = reportsOf(outcome).map((report, index) => ({
    file: report.file,
    layout: report.layout,
    unit: report.unit,
    rows: report.rows,
    accepted: report.accepted,
    rejectedTotal: report.rejectedTotal,
    rejectedFile: fileOfRejected(report),
    rejected: report.rejected.map(({ row, text, reason }) => ({ row, text, reason })),
    stations: report.stations.map(({ code, quantity, values, missing, first, last, zeros, min, max }) => ({
      ...{ code, quantity, values, missing, first, last, zeros, min, max },
    })),
    revisions: taken[index].revisions,
  }));
  return `${JSON.stringify({ files, ...(outcome.dryRun ? { dryRun: true } : {}), ...(findings ? { findings } : {}) }, null, 2)}\n`;
}

/** The report for people. */
export function reportText(outcome: ImportOutcome): string {
  const notes = (outcome.notes ?? []).map((note) => `${note}\n`).join('');
  const files = outcome.taken.map(fileText).join('');
  return `${notes}${files}${checksText(outcome)}${outcome.dryRun ? 'Only tried; nothing was changed.\n' : ''}`;
}

function checksText({ findings }: ImportOutcome): string {
  if (!findings || findings.findings === 0) return '';
  const things = findings.findings === 1 ? '1 thing' : `${findings.findings} things`;
  const where = findings.stations === 1 ? '1 station' : `${findings.stations} stations`;
  return `The checks found ${things} to look at, at ${where}; the Records page shows them, and no value was changed.\n`;
}

function fileText({ file, kind, summary, report, warnings, revisions }: TakenFile): string {
  const lines = [
    `${file}: ${kind}, ${summary}`,
    ...(report ? flowLines(report) : []),
    ...(revisions ? revisionLines(revisions) : []),
  ];
  return `${[...lines, ...warnings.map((warning) => `  ${warning}`)].join('\n')}\n`;
}

/** What a file does to days that stand; nothing for one that only brings new days. */
export function revisionLines({ filled, equal, unlike, revised, extended, stations }: Revisions): string[] {
  if (filled + equal + unlike === 0) return [];
  const most = stations
    .slice(0, SHOWN)
    .map(
      ({ code, unlike: days, largest: { date, standing, other, unit } }) =>
        `    ${code}: ${days} unlike, most on ${date}: ${plain(standing)} ${unit}, in the file ${plain(other)}`,
    );
  return [
    `  days that stand: ${equal} equal, ${unlike} unlike (${revised} take the new value); ${filled} gaps filled, ${extended} days added`,
    ...most,
  ];
}

const plain = (value: number): string => String(Number(value.toPrecision(10)));

/** Names a record that is not of flow. */
const besideFlow = (quantity: Quantity = 'flow'): string => (quantity === 'flow' ? '' : `, ${quantityWords(quantity)}`);

function flowLines(report: ImportReport): string[] {
  const { layout, unit, rows, accepted, rejectedTotal } = report;
  const rejected = report.rejected
    .slice(0, SHOWN)
    .map(({ row, text, reason }) => `  row ${row} was rejected: ${reason} (“${text}”)`);
  const all = fileOfRejected(report);
  return [
    `  layout ${layout}, ${unit}; ${rows} rows read, ${accepted} accepted, ${rejectedTotal} rejected`,
    ...report.stations.map(
      ({ code, quantity, values, missing, first, last, gaps, longestGapDays }) =>
        `  ${code}${besideFlow(quantity)}: ${values} values${first === null ? '' : `, ${first} to ${last}`}, ${missing} missing, ${gaps} gaps${
          gaps > 0 ? ` (longest ${longestGapDays} days)` : ''
        }`,
    ),
    ...rejected,
    ...(all === null ? [] : [`  all rejected rows: ${all}`]),
  ];
}
