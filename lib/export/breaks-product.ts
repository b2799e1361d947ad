import type { Break, RegionBreaks, Segment, StationBreaks, StepTest } from '../region/break-types.ts';
import { type Column, csvTable } from './csv.ts';
import { type Provenance, provenanceNotes } from './provenance.ts';
import { STATION_CODE } from './shared-columns.ts';
import { tableMetadata } from './table-metadata.ts';

/** One break of one station. */
interface BreakRow {
  code: string;
  name: string;
  tested: string;
  unit: string;
  known: Break;
  /** null for a break without usable years on both sides */
  step: StepTest | null;
  reason: string;
}

type Datatype = Column<BreakRow>['datatype'];

function of(
  name: string,
  datatype: Datatype,
  description: string,
  value: (step: StepTest) => number | string | null,
): Column<BreakRow> {
  return { name, datatype, description, value: ({ step }) => (step === null ? null : value(step)) };
}

function ofSide(side: 'before' | 'after'): Column<BreakRow>[] {
  const from = (read: (segment: Segment) => number | null) => (step: StepTest) => read(step[side]);
  return [
    of(
      `${side}_first`,
      'integer',
      `first low-flow year of the part ${side}`,
      from(({ first }) => first),
    ),
    of(
      `${side}_last`,
      'integer',
      `last low-flow year of the part ${side}`,
      from(({ last }) => last),
    ),
    of(
      `years_${side}`,
      'integer',
      `usable years ${side}`,
      from(({ years }) => years),
    ),
    of(
      `median_${side}`,
      'number',
      `median ${side}, in the unit`,
      from((segment) => segment.median),
    ),
    of(
      `mean_${side}`,
      'number',
      `mean ${side}, in the unit`,
      from(({ mean }) => mean),
    ),
  ];
}

const COLUMNS: readonly Column<BreakRow>[] = [
  STATION_CODE,
  { name: 'station_name', datatype: 'string', description: 'name of the gauging station', value: (row) => row.name },
  {
    name: 'break_year',
    datatype: 'integer',
    description: 'first low-flow year after the break',
    value: ({ known }) => known.year,
  },
  {
    name: 'break_from',
    datatype: 'string',
    description: 'change: a dated change of the station; chosen: a person’s choice',
    value: ({ known }) => known.from,
  },
  { name: 'break_words', datatype: 'string', description: 'what the break is', value: ({ known }) => known.words },
  { name: 'compared', datatype: 'string', description: 'annual figures that are compared', value: (row) => row.tested },
  { name: 'unit', datatype: 'string', description: 'their unit; empty for a number without', value: (row) => row.unit },
  ...ofSide('before'),
  ...ofSide('after'),
  of('difference', 'number', 'Hodges–Lehmann difference after − before, in the unit', (step) => step.difference),
  of('ci_low', 'number', 'lower end of its 95 % interval', (step) => step.low),
  of('ci_high', 'number', 'upper end of its 95 % interval', (step) => step.high),
  of('difference_percent', 'number', 'the difference in percent of the median before', (step) => step.percent),
  of('ci_low_percent', 'number', 'lower end of its interval in percent', (step) => step.percentLow),
  of('ci_high_percent', 'number', 'upper end of its interval in percent', (step) => step.percentHigh),
  of('z', 'number', 'rank-sum test, below 0 where the later part is lower', (step) => step.z),
  of('p_value', 'number', 'two-sided, not adjusted', (step) => step.p),
  of('p_adjusted', 'number', 'Benjamini–Hochberg over all steps of the table', (step) => step.pAdjusted),
  of('serial_factor', 'number', 'what serial correlation multiplies the variance by', (step) => step.serialFactor),
  {
    name: 'warning',
    datatype: 'string',
    description: 'what a reader must know; why there is no comparison',
    value: ({ step, reason }) => step?.warning ?? reason,
  },
];

/** Every break of every station, those without usable years on both sides with the reason, by year. */
function* breakRows(stations: readonly StationBreaks[]): Generator<BreakRow> {
  for (const { code, name, tested, unit, steps, leftOut } of stations) {
    const head = { code, name, tested, unit };
    const rows: BreakRow[] = [
      ...steps.map((step) => ({ ...head, known: step.break, step, reason: '' })),
      ...leftOut.map(({ break: known, reason }) => ({ ...head, known, step: null, reason })),
    ];
    yield* rows.sort((a, b) => a.known.year - b.known.year);
  }
}

/** Before and after at one station: in CSV a row a break; JSON also has the levels and what the figures suggest. */
export function stationBreaksProduct(format: 'csv' | 'json', breaks: StationBreaks, from: Provenance): string {
  if (format === 'csv') return csvTable(COLUMNS, breakRows([breaks]));
  return JSON.stringify({ ...provenanceNotes(from), ...breaks });
}

/** Before and after at the stations of a region. */
export function regionBreaksProduct(format: 'csv' | 'json', breaks: RegionBreaks, from: Provenance): string {
  if (format === 'csv') return csvTable(COLUMNS, breakRows(breaks.stations));
  return JSON.stringify({ ...provenanceNotes(from), ...breaks });
}

/** What lies beside the CSV file.
 *  @param code  of the station, when the file is of one */
export function breaksMetadata(from: Provenance, fileName: string, code?: string): Record<string, unknown> {
  const whose = code === undefined ? from.region.name : `${from.region.name}, ${code}`;
  return tableMetadata(fileName, `${whose}: before and after`, COLUMNS, from);
}
