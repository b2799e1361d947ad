/** Which control on the screen answers a problem of a file. */
import type { Need } from '@/lib/intake/types';
import type { PreviewProblem } from '@/lib/jobs/upload-types';

/** The controls that can be asked for. columns: the headings of the first rows, or the places of a fixed-width file */
export const CONTROLS = [
  ...(['layout', 'station', 'date', 'firstYear', 'dailyMean', 'quantity', 'unit', 'decimal', 'thousands'] as const),
  ...(['delimiter', 'missing', 'sheet', 'where', 'columns', 'flags', 'also', 'codes'] as const),
] as const;
export type Control = (typeof CONTROLS)[number];

const CONTROL_OF: Partial<Record<Need, Control>> = {
  unit: 'unit',
  station: 'station',
  'date-order': 'date',
  mapping: 'columns',
  century: 'firstYear',
  'daily-mean': 'dailyMean',
  codes: 'codes',
  quantity: 'quantity',
  sheet: 'sheet',
  thousands: 'thousands',
};

export type Asked = Partial<Record<Control, string>>;

/** What is asked, by the control that answers it.
 *  @param changed  the control that was changed last: a mapping that cannot be read is its doing */
export function askedOf(problems: readonly PreviewProblem[], readable: boolean, changed: Control | null): Asked {
  const asked: Asked = {};
  for (const { problem } of problems) {
    const usual = problem.needs && CONTROL_OF[problem.needs];
    const control = !readable && changed && problem.needs === 'mapping' ? changed : usual;
    if (control)
      asked[control] ??= sentence(problem.value ? `${problem.message} (“${problem.value}”)` : problem.message);
  }
  return asked;
}

/** Controls that stand among the rarer ones: when one of them is asked for, these are to be in sight. */
export const RARE: readonly Control[] = [
  ...(['firstYear', 'dailyMean', 'decimal', 'thousands', 'delimiter', 'missing', 'where', 'flags'] as const),
];

export function sentence(words: string): string {
  const text = words.charAt(0).toUpperCase() + words.slice(1);
  return /[.!?]$/.test(text) ? text : `${text}.`;
}
