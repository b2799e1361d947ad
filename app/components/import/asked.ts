/** Which control on the screen answers a problem of a file. */
import type { Mapping, Need } from '@/lib/intake/types';
import type { PreviewProblem } from '@/lib/jobs/upload-types';

/** The controls that can be asked for. columns: the headings of the first rows, or the places of a fixed-width file */
export const CONTROLS = [
  ...(['layout', 'station', 'date', 'firstYear', 'dailyMean', 'quantity', 'unit', 'decimal', 'thousands'] as const),
  ...(['delimiter', 'missing', 'sheet', 'where', 'columns', 'also'] as const),
] as const;
export type Control = (typeof CONTROLS)[number];

const CONTROL_OF: Partial<Record<Need, Control>> = {
  unit: 'unit',
  station: 'station',
  'date-order': 'date',
  mapping: 'columns',
  century: 'firstYear',
  'daily-mean': 'dailyMean',
  quantity: 'quantity',
  sheet: 'sheet',
  thousands: 'thousands',
};

export type Asked = Partial<Record<Control, string>>;

interface Sight {
  /** the choices could not be read, and what is shown is from before */
  stale: boolean;
  /** the control that was changed last: choices that cannot be read are its doing */
  changed: Control | null;
  /** the file is a document, whose series are chosen as a whole */
  document: boolean;
  /** where the file's stations come from; null where that is not known */
  station: Mapping['station']['from'] | null;
}

/** Which problems a control answers, with what is asked there; the others have to be put right elsewhere. */
export function sortOut(
  problems: readonly PreviewProblem[],
  sight: Sight,
): { asked: Asked; others: readonly PreviewProblem[] } {
  const asked: Asked = {};
  const others = problems.filter(({ problem }) => {
    const control = controlOf(problem.needs, sight);
    if (control === null) return true;
    const value = problem.value === undefined ? '' : ` (“${problem.value}”)`;
    const row = problem.row === undefined ? '' : `Row ${problem.row}: `;
    asked[control] ??= sentence(`${row}${problem.message}${value}`);
    return false;
  });
  return { asked, others };
}

function controlOf(needs: Need | undefined, { stale, changed, document, station }: Sight): Control | null {
  if (needs === 'mapping' && stale && changed) return changed;
  // codes that stand in the file are not answered by one code
  if (needs === 'station' && (station === null || station === 'column' || station === 'header')) return null;
  // quantities that a column of a table tells apart are told apart by its rows
  if (needs === 'quantity' && !document) return 'where';
  return (needs && CONTROL_OF[needs]) ?? null;
}

/** The controls by the names that stand above them. */
export const CONTROL_WORDS: Record<Control, string> = {
  layout: 'layout',
  station: 'station',
  date: 'order of the dates',
  firstYear: 'two-digit years',
  dailyMean: 'several values a day',
  quantity: 'quantity',
  unit: 'unit of the values',
  decimal: 'decimal sign',
  thousands: 'sign between thousands',
  delimiter: 'what parts the columns',
  missing: 'what means missing',
  sheet: 'sheet',
  where: 'which rows are meant',
  columns: 'what the columns hold',
  also: 'what else is taken along',
};

/** Controls that stand among the rarer ones: when one of them is asked for, these are to be in sight. */
export const RARE: readonly Control[] = [
  ...(['firstYear', 'dailyMean', 'decimal', 'thousands', 'delimiter', 'missing', 'where'] as const),
];

export function sentence(words: string): string {
  const text = words.charAt(0).toUpperCase() + words.slice(1);
  return /[.!?]$/.test(text) ? text : `${text}.`;
}
