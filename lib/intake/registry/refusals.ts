import { AREA_UNITS } from '../../series/area-units.ts';
import { type Correction, IntakeError, type RejectedRow } from '../types.ts';
import type { Positions } from './positions.ts';
import type { RowProblem } from './row-problem.ts';

/** Why a registry is not taken: every row at fault is named. */
export function refuseRows(problems: readonly (RowProblem & RejectedRow)[], file: string): IntakeError {
  const [first, ...others] = problems;
  const more = others.slice(0, 4).map(({ row, reason, value }) => `row ${row}: ${reason} (“${value}”)`);
  const rest = others.length > 4 ? ` and ${others.length - 4} more` : '';
  const also = others.length === 0 ? '' : `. Also ${more.join('; ')}${rest}. The registry is taken whole or not at all`;
  return new IntakeError({
    ...{ file, row: first.row, value: first.value, message: first.reason, remedy: `${first.remedy}${also}` },
    rows: problems.map(({ row, text, reason }) => ({ row, text, reason })),
  });
}

const WORDS: Record<Exclude<Correction, 'none'>, { reason: string; remedy: string }> = {
  'swap-coordinates': {
    reason: 'latitude and longitude seem to be swapped',
    remedy: 'Say that they are to be swapped back (--correct swap-coordinates), or put the rows right',
  },
  'longitude-360': {
    reason: 'the longitude is counted from 0 to 360',
    remedy: 'Say that it is to be counted from −180 to 180 (--correct longitude-360), or put the rows right',
  },
};

/** Positions that a correction would put right: it is offered, not made. */
export function refuseForCorrection(
  { correction, rows, unlikely }: NonNullable<Positions['asks']>,
  file: string,
): IntakeError {
  const { reason, remedy } = WORDS[correction];
  const [first] = rows;
  const { latitude, longitude } = first.station;
  const numbers = rows.slice(0, 10).map(({ line }) => line);
  const named =
    rows.length === 1 ? '' : ` in rows ${numbers.join(', ')}${rows.length > 10 ? ` and ${rows.length - 10} more` : ''}`;
  return new IntakeError({
    ...{
      file,
      row: first.line,
      value: `${latitude}, ${longitude}`,
      message: `${reason}${named}`,
      remedy: unlikely ? `${remedy}; or say that they stand as they should (--correct none)` : remedy,
    },
    ...{ needs: 'correction', corrections: unlikely ? [correction, 'none'] : [correction] },
    rows: rows.map(({ line, text }) => ({ row: line, text, reason })),
  });
}

/** Areas of a column whose heading names no unit. */
export function refuseUnknownArea(heading: string, row: number, file: string): IntakeError {
  return new IntakeError({
    ...{ file, row, value: heading, needs: 'area' },
    message: 'the registry does not say in which unit its areas are',
    remedy: `Say it: ${AREA_UNITS.join(', ')} (--area-unit); or name the column “${heading}_km2” (or _mi2, _ha, _acres, _m2), or add a column area_unit`,
  });
}

/** Commas that may be decimal as well as between thousands. */
export function refuseOpenCommas(value: string, file: string): IntakeError {
  return new IntakeError({
    ...{ file, value },
    message: 'nothing says whether the comma in the numbers sets off decimals or thousands',
    remedy: 'Write the areas without separators between thousands, and decimals with a point',
  });
}
