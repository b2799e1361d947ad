import { columnPosition } from '../mapping.ts';
import type { FieldPlace, Mapping } from '../types.ts';
import type { ColumnRoles, WideColumn } from './assign-columns.ts';
import { mappingProblem } from './plan-problems.ts';
import type { TablePlan } from './table-plan.ts';
import { wideColumns } from './wide-columns.ts';

/** Where a mapping has the fields of a table of columns, worked out to positions.
 *  @returns `wide`: the columns of a wide table's stations, null for other tables
 *  @throws IntakeError for columns that the header does not have, and for characters in place of columns */
export function columnPlaces(
  mapping: Mapping,
  roles: ColumnRoles,
  { header, fieldCount, file }: { header: string[] | null; fieldCount: number; file: string },
): { places: TablePlan['places']; wide: WideColumn[] | null } {
  const position = (column: number | string | [number, number]): number => {
    if (typeof column !== 'object') return columnPosition(column, header, file);
    throw mappingProblem(file, 'the mapping gives characters, but the file has delimited columns');
  };
  const placeOf = (place: FieldPlace | null): number =>
    place === null ? -1 : position('slice' in place ? place.slice : place.column);
  const wide = mapping.layout === 'wide' ? wideColumns(roles, header, mapping, fieldCount, position) : null;
  const places = {
    date: mapping.date.columns.map(position),
    station: mapping.station.from === 'column' ? position(mapping.station.column) : -1,
    value: wide ? -1 : placeOf(mapping.value),
    flag: wide ? -1 : placeOf(mapping.flag),
    where: mapping.where ? position(mapping.where.column) : -1,
    unit: wide ? -1 : (roles.unitColumn ?? -1),
  };
  return { places, wide };
}
