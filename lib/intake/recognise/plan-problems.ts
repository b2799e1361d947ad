import { IntakeError, type Mapping } from '../types.ts';
import type { ColumnRoles, WideColumn } from './assign-columns.ts';
import { unitProblem } from './find-unit.ts';

/** A question that a mapping answers. */
export function mappingProblem(
  file: string,
  message: string,
  value?: string,
  remedy = 'Choose the columns on the screen, or give a mapping such as {"value": {"column": "flow"}}',
): IntakeError {
  return new IntakeError({
    file,
    ...(value ? { value } : {}),
    message,
    remedy,
    needs: 'mapping',
  });
}

/** Rows of several quantities, of which none is known to be the flow. */
export function quantityProblem(file: string, column: string): IntakeError {
  return new IntakeError({
    file,
    value: column,
    message: 'the file holds several quantities, told apart by a column; which of them is the flow is not said',
    remedy: `Give a mapping such as {"where": {"column": "${column}", "equals": "1"}}`,
    needs: 'quantity',
  });
}

/** Dates with two-digit years: which hundred years they lie in is asked, never guessed. */
export function centuryProblem(file: string, date: string): IntakeError {
  return new IntakeError({
    file,
    value: date,
    message: 'the years have two digits, and the file does not say of which century',
    remedy:
      'Say the first of the hundred years that they stand for, in a mapping such as {"firstYear": 1930}: "30" is then 1930 and "29" is 2029',
    needs: 'century',
  });
}

/** A mapping says that the lines above the table name the station, and they do not. */
export function stationProblem(file: string): IntakeError {
  return new IntakeError({
    file,
    message: 'the lines above the table do not name the station',
    remedy: 'Say which station the flows are of, or in a mapping where it is named',
    needs: 'station',
  });
}

/** A sign before three digits that may set decimals or thousands apart. */
export function thousandsProblem(file: string, value: string): IntakeError {
  const sign = value.includes(',') ? ',' : '.';
  return new IntakeError({
    file,
    value,
    message: `“${sign}” may stand before decimals or between thousands; no value of the file says which`,
    remedy: `Say it in a mapping: {"decimal": "${sign}"} or {"thousands": "${sign}"}`,
    needs: 'thousands',
  });
}

/** What stands against reading a table of columns as the mapping has it. */
export function problemsOf(
  file: string,
  mapping: Mapping,
  roles: ColumnRoles,
  header: readonly string[] | null,
  wide: readonly WideColumn[] | null,
): IntakeError[] {
  const problems: IntakeError[] = [];
  const shown = header?.join(', ').slice(0, 200);
  if (mapping.date.columns.length === 0) problems.push(mappingProblem(file, 'no column holds dates', shown));
  if (wide ? wide.length === 0 : mapping.value === null) {
    const message =
      roles.candidates.length > 1 ? 'several columns may hold the flows' : 'no column is known to hold the flows';
    problems.push(mappingProblem(file, message, shown));
  }
  if (roles.quantityColumn !== null && !mapping.where) {
    problems.push(quantityProblem(file, header?.[roles.quantityColumn] ?? ''));
  }
  const twice = wide?.find(({ name }, at) => wide.findIndex((other) => other.name === name) < at);
  if (twice) {
    problems.push(
      new IntakeError({
        file,
        value: twice.name,
        message: 'two columns have the same heading, so a station would have two values a day',
        remedy: 'Give each station one column',
      }),
    );
  }
  if (mapping.unit === null) {
    const heading = mapping.value && 'column' in mapping.value ? mapping.value.column : null;
    problems.push(
      unitProblem(file, typeof heading === 'number' ? (header?.[heading] ?? null) : heading, mapping.quantity),
    );
  }
  return problems;
}
