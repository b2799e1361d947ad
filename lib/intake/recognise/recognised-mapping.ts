import type { InspectOptions, Layout, Mapping } from '../types.ts';
import type { ColumnRoles } from './assign-columns.ts';
import { usesDecimalComma } from './column-facts.ts';
import { findUnit } from './find-unit.ts';
import type { SampleRow } from './sample.ts';

/** What was recognised, with what a person gave laid over it. */
export function mappingOf(
  roles: ColumnRoles,
  data: readonly SampleRow[],
  found: {
    header: string[] | null;
    delimiter: string | null;
    remarks: string[];
    options: InspectOptions;
    layout: Layout;
  },
): Mapping {
  const { header, delimiter, remarks, options } = found;
  const valueColumns = roles.wide?.map(({ value }) => value) ?? (roles.value === null ? [] : [roles.value]);
  const valueTexts = data.flatMap(({ fields }) => valueColumns.map((column) => fields[column] ?? ''));
  const column = (at: number | null) => (at === null ? null : { column: at });
  const where = quantityFilter(roles, data, remarks);
  return {
    layout: found.layout,
    station: stationOf(roles, options),
    date: { columns: roles.date, order: roles.partsOrder ?? 'ymd' },
    value: roles.wide ? null : column(roles.value),
    flag: roles.wide ? null : column(roles.flag),
    missing: [],
    decimal: delimiter !== ',' && usesDecimalComma(valueTexts) ? ',' : '.',
    ...(delimiter === null ? {} : { delimiter }),
    ...(where ? { where } : {}),
    ...options.mapping,
    unit:
      options.unit ??
      options.mapping?.unit ??
      findUnit({
        headings: valueColumns.map((at) => header?.[at] ?? ''),
        unitText: mostFrequent(columnTexts(data, roles.unitColumn ?? -1)),
        remarks,
      }),
  };
}

function stationOf(roles: ColumnRoles, options: InspectOptions): Mapping['station'] {
  if (roles.wide) return { from: 'header' };
  if (roles.station !== null) return { from: 'column', column: roles.station };
  return options.station ? { from: 'given', code: options.station } : { from: 'file-name' };
}

/** Files that hold several quantities number them in a column; a title line says which number is discharge. */
function quantityFilter(roles: ColumnRoles, data: readonly SampleRow[], remarks: string[]): Mapping['where'] | null {
  const column = roles.quantityColumn;
  if (column === null) return null;
  const titled = remarks
    .map((text) => /(?:discharge|flow)[^=]*\(\s*\w+\s*=\s*(\w+)\s*\)/i.exec(text)?.[1])
    .find(Boolean);
  if (titled) return { column, equals: titled };
  const texts = new Set(data.map(({ fields }) => fields[column] ?? ''));
  return texts.size === 1 ? { column, equals: [...texts][0] } : null;
}

/** The filled fields of a column. */
export function columnTexts(data: readonly SampleRow[], column: number): string[] {
  return column < 0 ? [] : data.map(({ fields }) => fields[column] ?? '').filter((text) => text !== '');
}

/** The text that occurs most often; empty when there is none. */
export function mostFrequent(texts: readonly string[]): string {
  const counts = new Map<string, number>();
  for (const text of texts) counts.set(text, (counts.get(text) ?? 0) + 1);
  return [...counts].sort((a, b) => b[1] - a[1])[0]?.[0] ?? '';
}
