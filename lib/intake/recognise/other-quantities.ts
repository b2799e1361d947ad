import { UNITS_OF } from '../../series/quantities.ts';
import type { AlsoCandidate, FieldPlace, Mapping, Quantity, Unit } from '../types.ts';
import type { ColumnRoles } from './assign-columns.ts';
import type { SampleRow } from './sample.ts';

/** Words that name a quantity beside flow, marks over letters left out. Evaporation alone may be the actual one, or that
 *  of a pan, and names none. */
const NAMES: [Quantity, RegExp][] = [
  [
    'potential-evaporation',
    /\b(?:pet|pe|eto|et0|potential evap\w*|potentielle verdunstung|evap\w* potenti\w*|evap\w* potenci\w*)\b/,
  ],
  [
    'rainfall',
    /\b(?:rain|rainfall|precip|precipitation\w*|precipitacion|precipitacao|prcp|ppt|niederschlag|pluie|lluvia|chuva|nederbord|neerslag)\b/,
  ],
  [
    'stage',
    /\b(?:stage|level|water level|gage ?height|gauge ?height|height|wasserstand|hauteur|nivel|cota|vattenstand|waterstand)\b/,
  ],
];

const UNIT_NAMES: [Unit, RegExp][] = [
  ['mm', /\b(?:mm|millimet(?:er|re)s?)\b/],
  ['cm', /\b(?:cm|centimet(?:er|re)s?)\b/],
  ['m', /\b(?:m|met(?:er|re)s?)\b/],
  ['ft', /\b(?:ft|feet|foot)\b/],
  ['in', /\b(?:inch(?:es)?|in)\b/],
];

/** The quantity beside flow that a heading or a description names, and its unit where it says one that fits. */
export function otherQuantityIn(text: string): { quantity: Quantity | null; unit: Unit | null } {
  const plain = text
    .replace(/(\p{Ll})(\p{Lu})/gu, '$1 $2')
    .normalize('NFD')
    .replace(/\p{M}/gu, '')
    .replaceAll('_', ' ')
    .toLowerCase();
  const quantity = NAMES.find(([, pattern]) => pattern.test(plain))?.[0] ?? null;
  if (quantity === null) return { quantity: null, unit: null };
  const unit = UNIT_NAMES.find(([name, pattern]) => UNITS_OF[quantity].includes(name) && pattern.test(plain))?.[0];
  return { quantity, unit: unit ?? null };
}

/** Parameter and statistic of a public daily-values service: mean gage height in feet, sum of precipitation in inches. */
const SERIES: [RegExp, Quantity, Unit][] = [
  [/_00065_00003$/, 'stage', 'ft'],
  [/_00045_00006$/, 'rainfall', 'in'],
];

export interface OthersContext {
  header: readonly string[] | null;
  data: readonly SampleRow[];
  remarks: readonly string[];
  mapping: Mapping;
  /** position of the value that the mapping reads */
  value: number;
}

/** The quantities of a table that its mapping does not read. */
export function otherQuantities(roles: ColumnRoles, context: OthersContext): AlsoCandidate[] {
  const { mapping, value } = context;
  if (roles.wide !== null || value < 0) return [];
  if (mapping.where) return otherRows(mapping.where, context);
  return roles.candidates.filter((column) => column !== value).map((column) => otherColumn(column, context));
}

function otherColumn(column: number, { header, data, remarks }: OthersContext): AlsoCandidate {
  const heading = header?.[column] ?? '';
  const flag = heading === '' ? -1 : (header?.indexOf(`${heading}_cd`) ?? -1);
  const series = SERIES.find(([pattern]) => pattern.test(heading));
  const described = seriesDescribed(heading, remarks);
  const named = /_\d{5}_\d{5}$/.test(heading) ? { quantity: null, unit: null } : otherQuantityIn(heading);
  return {
    label: described ?? (heading || `column ${column + 1}`),
    samples: data.slice(0, 5).map(({ fields }) => fields[column] ?? ''),
    quantity: series?.[1] ?? named.quantity,
    unit: series?.[2] ?? named.unit,
    value: { column },
    flag: flag < 0 ? null : { column: flag },
  };
}

/** The line of a comment block that describes a series: "159456  00065  00003  Gage height, feet (Mean)". */
function seriesDescribed(heading: string, remarks: readonly string[]): string | null {
  for (const text of remarks) {
    const found = /^#\s*(\d+)\s+(\d{5})\s+(\d{5})\s+(\S.*)$/.exec(text);
    if (found && `${found[1]}_${found[2]}_${found[3]}` === heading) return found[4].trim();
  }
  return null;
}

/** Quantities that stand in rows of their own, told apart by a column; a title line may say what its texts mean. */
function otherRows(
  where: NonNullable<Mapping['where']>,
  { header, data, remarks, mapping, value }: OthersContext,
): AlsoCandidate[] {
  const column = typeof where.column === 'number' ? where.column : (header?.indexOf(where.column) ?? -1);
  if (column < 0) return [];
  const texts = [...new Set(data.map(({ fields }) => fields[column] ?? ''))].filter(
    (text) => text !== '' && text !== where.equals,
  );
  // A column of units, or of anything that hardly repeats, tells no quantities apart.
  if (texts.length > 20) return [];
  return texts.map((equals) => {
    const title = titleOf(equals, remarks);
    const samples = data.filter(({ fields }) => fields[column] === equals).slice(0, 5);
    return {
      label: title ?? `${header?.[column] ?? `column ${column + 1}`} = ${equals}`,
      samples: samples.map(({ fields }) => fields[value] ?? ''),
      ...otherQuantityIn(title ?? equals),
      value: mapping.value as FieldPlace,
      flag: mapping.flag,
      where: { column: where.column, equals },
    };
  });
}

/** "Daily Water Level (m)" of a title line such as "… and Daily Water Level (m) (PARAM = 2)". */
function titleOf(equals: string, remarks: readonly string[]): string | null {
  for (const text of remarks) {
    for (const [, title, named] of text.matchAll(/([^=]+?)\(\s*\w+\s*=\s*(\w+)\s*\)/g)) {
      if (named === equals) return title.replace(/^\s*(?:and|und|et|y|e)\s+/, '').trim();
    }
  }
  return null;
}
