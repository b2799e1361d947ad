import type { FlowUnit } from '../../series/flow-units.ts';
import type { NamedFlow, NamedFlowKind } from '../../series/station-history.ts';
import { monthOfName } from '../month-names.ts';
import { unitNamedIn } from '../units.ts';
import { type CommaMeaning, parseFigure } from './number-signs.ts';
import { plainHeading } from './plain-heading.ts';
import type { RowProblem } from './row-problem.ts';

/** A column of a registry whose flows mean something at each station: "legal_minimum_m3s". */
export interface NamedFlowColumn {
  kind: NamedFlowKind;
  name: string;
  value: number;
  /** as the heading says; null where a column says it row by row */
  unit: FlowUnit | null;
  /** −1 where there is none */
  unitColumn: number;
  months: number[] | null;
  monthsColumn: number;
}

const KINDS: [NamedFlowKind, RegExp][] = [
  ['legal minimum', /\b(?:legal|statutory|regulatory|permit) min(?:imum)?\b|\bminimum (?:legal )?flow\b/],
  [
    'abstraction stop',
    /\b(?:abstraction|diversion|withdrawal|pumping) (?:stop|limit|cease)\b|\bhands off\b|\bhof\b|\bstop flow\b/,
  ],
  [
    'residual flow',
    /\b(?:residual|compensation|environmental|reserved|ecological|prescribed) (?:flow|release)\b|\brestwasser/,
  ],
  ['intake level', /\bintake (?:level|flow|limit)\b/],
];

const UNIT_WORDS = new Set(
  'm3s m3 s l ls lps cfs ft3 ft3s cumecs cms ml d mld mgd mgal gal mm mmd acre ft per day sec'.split(' '),
);

/** The columns of named flows, with those that say their units and months row by row. */
export function namedFlowColumns(headings: readonly string[]): NamedFlowColumn[] {
  const plain = headings.map(plainHeading);
  const shared = plain.findIndex((heading) => /^named flows? units?$/.test(heading));
  return plain.flatMap((heading, value) => {
    const kind = KINDS.find(([, pattern]) => pattern.test(heading))?.[0];
    if (kind === undefined || /\b(?:units?|months?)$/.test(heading)) return [];
    const words = heading.split(' ').filter((word) => !UNIT_WORDS.has(word));
    const months = words.filter((word) => monthOfName(word) > 0);
    const name = words.filter((word) => !months.includes(word)).join(' ');
    const beside = (pattern: string) => plain.findIndex((other) => new RegExp(`^${name} ${pattern}$`).test(other));
    const unitColumn = beside('units?');
    return {
      ...{ kind, name, value, unit: unitNamedIn(headings[value]) },
      unitColumn: unitColumn < 0 ? shared : unitColumn,
      months: months.length > 0 ? monthsIn(months.join('-')) : null,
      monthsColumn: beside('months?'),
    };
  });
}

/** The named flows of a row; empty fields are flows that the station has not.
 *  @returns what is wrong with the first that cannot be read */
export function namedFlowsOf(
  text: (column: number) => string,
  columns: readonly NamedFlowColumn[],
  comma: CommaMeaning,
): NamedFlow[] | RowProblem {
  const flows: NamedFlow[] = [];
  for (const { kind, name, value: column, unit: stated, unitColumn, months: always, monthsColumn } of columns) {
    const written = text(column);
    const value = parseFigure(written, comma);
    if (value === null) continue;
    if (!(value >= 0))
      return {
        value: written,
        reason: `the ${name} is not a flow`,
        remedy: 'Give a number, or leave it empty where there is none',
      };
    const unit = stated ?? unitNamedIn(text(unitColumn));
    if (unit === null) {
      const remedy = `Name the column “${name.replaceAll(' ', '_')}_m3s” (or by another unit), or add a column “${name.replaceAll(' ', '_')}_unit”`;
      return { value: written, reason: `nothing says in which unit the ${name} is`, remedy };
    }
    const inMonths = text(monthsColumn);
    const months = inMonths === '' ? always : monthsIn(inMonths);
    if (inMonths !== '' && months === null)
      return {
        value: inMonths,
        reason: `the months of the ${name} cannot be read`,
        remedy: 'Write them as 4-9, Apr–Sep or 4, 5, 6',
      };
    flows.push({ name, kind, value, unit, months });
  }
  return flows;
}

/** Months of a list or a span, which may run over the new year: "4-9", "Oct–Mar", "4, 5, 6"; null when they are none. */
export function monthsIn(text: string): number[] | null {
  const monthOf = (part: string): number => {
    const number = /^\d{1,2}$/.test(part) ? Number(part) : monthOfName(part);
    return number >= 1 && number <= 12 ? number : 0;
  };
  const months = new Set<number>();
  for (const piece of text.split(/[,;/]|\band\b/).map((part) => part.trim())) {
    const [first, last = first, ...more] = piece.split(/\s*(?:[-–]|\bto\b)\s*/).map(monthOf);
    if (first === 0 || last === 0 || more.length > 0) return null;
    for (let month = first; ; month = (month % 12) + 1) {
      months.add(month);
      if (month === last) break;
    }
  }
  return [...months].sort((a, b) => a - b);
}
