import { KM2_OF, KM2_OF_M2 } from '../../series/area-units.ts';
import type { RegistryFact } from '../types.ts';
import { type NamedFlowColumn, namedFlowColumns } from './named-flow-columns.ts';
import { plainHeading } from './plain-heading.ts';

/** Which column of a registry holds which fact; −1 where none does. */
export interface RegistryColumns extends Record<RegistryFact | 'code' | 'areaUnit', number> {
  /** further columns of areas, not read */
  otherAreas: number[];
  /** columns of one named flow each; `namedFlows` is a column that holds all of them as JSON */
  flows: NamedFlowColumn[];
}

const NOUN = '(?:station|site|gauge|gage|stn|gauging station)';
const NUMBER = '(?:code|id|no|number|nr|num|nummer|ref|reference)';

/** What may head each column, best first: the first pattern that some heading fits decides. */
const PATTERNS: Record<Exclude<RegistryFact, 'areaKm2'> | 'code', RegExp[]> = {
  code: [
    new RegExp(`^${NOUN} ?${NUMBER}$`),
    /^(code|id)$/,
    new RegExp(`^${NUMBER}$`),
    new RegExp(`^${NOUN}$`),
    /^\p{L}+ (?:code|id|no|number|nummer)$/u,
  ],
  name: [
    new RegExp(`^${NOUN} ?(?:name|nm)$`),
    /^(name|title|bezeichnung|nom|nombre)$/,
    new RegExp(`^${NOUN}$`),
    /^messstelle$/,
  ],
  river: [
    /^(river|stream|watercourse|waterbody|water body|river name|stream name|gewässer|fluss|cours d eau|río|rio)$/,
    /\b(river|stream|watercourse)\b/,
  ],
  latitude: [/^dec lat va$/, /^(lat|latitude|breite)$/, /\b(lat|latitude)\b(?!.*\b(dms|datum|accuracy)\b)/, /^y$/],
  longitude: [
    /^dec long va$/,
    /^(lon|long|lng|longitude|länge)$/,
    /\b(lon|long|lng|longitude)\b(?!.*\b(dms|datum|accuracy|name)\b)/,
    /^x$/,
  ],
  influence: [/^(influence|influenced|flow influence|influence type)$/],
  changes: [/^(dated )?changes$/],
  namedFlows: [/^named flows$/],
  notes: [/^(notes?|remarks?|comments?|bemerkung|bemerkungen)$/],
  derived: [/^(derived|derived record|recipe)$/],
};

const AREA = /\b(area|catchment size|basin size|einzugsgebiet|superficie)\b/;
const AREA_UNIT = /\barea units?\b|^units? of area$/;

/** Finds the columns by their headings. A registry must have a column for the code. */
export function registryColumns(headings: readonly string[]): RegistryColumns {
  const plain = headings.map(plainHeading);
  const taken = new Set<number>();
  const find = (patterns: readonly RegExp[]): number => {
    for (const pattern of patterns) {
      const at = plain.findIndex((heading, position) => !taken.has(position) && pattern.test(heading));
      if (at < 0) continue;
      taken.add(at);
      return at;
    }
    return -1;
  };
  const flows = namedFlowColumns(headings);
  for (const { value, unitColumn, monthsColumn } of flows)
    for (const at of [value, unitColumn, monthsColumn]) taken.add(at);
  const areaUnit = find([AREA_UNIT]);
  const areas = plain.flatMap((heading, at) => (!taken.has(at) && AREA.test(heading) ? [at] : []));
  const withUnit = areas.filter((at) => areaFactorOf(headings[at]) !== null);
  const areaKm2 = withUnit[0] ?? areas[0] ?? -1;
  for (const at of areas) taken.add(at);
  // In this order, so that "station" names the station only when another column holds its code.
  const code = find(PATTERNS.code);
  return {
    ...{ code, areaUnit, areaKm2, otherAreas: areas.filter((at) => at !== areaKm2), flows },
    latitude: find(PATTERNS.latitude),
    longitude: find(PATTERNS.longitude),
    name: find(PATTERNS.name),
    river: find(PATTERNS.river),
    influence: find(PATTERNS.influence),
    changes: find(PATTERNS.changes),
    namedFlows: find(PATTERNS.namedFlows),
    notes: find(PATTERNS.notes),
    derived: find(PATTERNS.derived),
  };
}

/** Whether some column holds codes. Nearly all rows that are asked are no headings, which a few patterns tell. */
export function holdsCodes(headings: readonly string[]): boolean {
  const plain = headings.map(plainHeading);
  const mayHold = PATTERNS.code.some((pattern) => plain.some((heading) => pattern.test(heading)));
  return mayHold && registryColumns(headings).code >= 0;
}

/** How headings and fields of registries write units of area, and km² in one. */
const AREA_UNITS: [RegExp, number][] = [
  [/\b(km ?2|sq ?km|square kilomet(?:er|re)s?|qkm)\b/, KM2_OF['km²']],
  [/\b(mi ?2|sq ?mi|sq miles?|square miles?|miles? ?2)\b/, KM2_OF['mi²']],
  [/\b(ha|hectares?|hektar)\b/, KM2_OF.ha],
  [/\b(acres?|ac)\b/, KM2_OF.acres],
  [/\b(m ?2|sq ?m|square met(?:er|re)s?)\b/, KM2_OF_M2],
  // A site table of a public agency that never states its unit: square miles.
  [/^(contrib )?drain area va$/, KM2_OF['mi²']],
];

/** km² in one unit of the area that a heading, or a field of the unit column, names; null when it names none. */
export function areaFactorOf(text: string): number | null {
  const plain = plainHeading(text);
  return AREA_UNITS.find(([pattern]) => pattern.test(plain))?.[1] ?? null;
}
