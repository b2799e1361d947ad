/** How an import's terms are said on the screen. */
import type { Correction, Layout, Mapping, Quantity, Unit } from '@/lib/intake/types';
import type { FileKind } from '@/lib/jobs/import-types';
import { FLAG, type FlagName } from '@/lib/series/daily-series';
import type { OverlapRule } from '@/lib/store/lay-parts';

export const LAYOUT_WORDS: Record<Layout, string> = {
  long: 'one row a station and day',
  wide: 'one row a day, one column a station',
  'agency-tab': 'tab-delimited, with qualifier columns',
  whitespace: 'columns parted by blanks',
  'fixed-width': 'columns of fixed width',
  'month-rows': 'a row a month, a column a day',
  'day-rows': 'a row a day, a column a month',
  'waterml-2': 'WaterML 2.0',
  'waterml-1': 'WaterML 1.1',
  'waterml-json': 'WaterML 1.1 as JSON',
};

/** Layouts that a person may say a text file has; a document is known by its content alone. */
export const TEXT_LAYOUTS = [
  ...(['long', 'wide', 'agency-tab', 'whitespace', 'fixed-width', 'month-rows', 'day-rows'] as const),
] as const satisfies readonly Layout[];

export const isDocument = (layout: Layout | null): boolean => layout?.startsWith('waterml') ?? false;

export const KIND_WORDS: Record<FileKind, string> = {
  flows: 'daily values',
  registry: 'station list',
  layer: 'map layer',
};

export const QUANTITY_WORDS: Record<Quantity, string> = {
  flow: 'flow',
  stage: 'stage',
  rainfall: 'rainfall',
  'potential-evaporation': 'potential evaporation',
};

export const UNIT_WORDS: Record<Unit, string> = {
  'm3/s': 'm³/s, cubic metres a second',
  'L/s': 'L/s, litres a second',
  'ft3/s': 'ft³/s, cubic feet a second',
  'ML/d': 'ML/d, megalitres a day',
  'Mgal/d': 'Mgal/d, million US gallons a day',
  'acre-ft/d': 'acre-ft/d, acre-feet a day',
  'mm/d': 'mm/d, depth over the drainage area',
  m: 'm',
  cm: 'cm',
  mm: 'mm',
  ft: 'ft',
  in: 'in, inches',
};

export const ORDER_WORDS: Record<Mapping['date']['order'], string> = {
  dmy: 'day first (3/4 is 3 April)',
  mdy: 'month first (3/4 is 4 March)',
  ymd: 'year first (2010-04-03)',
};

export const RULE_WORDS: Record<OverlapRule, string> = {
  keep: 'Keep what stands',
  'take-new': 'Take the new values',
  'take-where-provisional': 'Take the new values where the old ones were provisional',
};

export const CORRECTION_WORDS: Record<Correction, string> = {
  'swap-coordinates': 'Swap latitude and longitude',
  'longitude-360': 'Read longitudes from 0 to 360 as east of Greenwich, so that 350 is 10 degrees west',
  none: 'Leave the coordinates as they are',
};

/** What flag bits were understood as: "estimated, ice"; empty for none. */
export function flagWords(bits: number): string {
  const names = Object.keys(FLAG) as FlagName[];
  return names
    .filter((name) => (bits & FLAG[name]) !== 0)
    .map((name) => name.replaceAll('-', ' '))
    .join(', ');
}
