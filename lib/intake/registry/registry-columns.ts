import type { RegistryFact } from '../types.ts';

/** Which column of a registry holds which fact; −1 where none does. */
export interface RegistryColumns extends Record<RegistryFact | 'code' | 'areaUnit', number> {
  /** further columns of areas, not read */
  otherAreas: number[];
}

/** "Drainage_Area (km²)" → "drainage area km2" */
export function plainHeading(heading: string): string {
  return heading
    .replace(/(\p{Ll})(\p{Lu})/gu, '$1 $2')
    .toLowerCase()
    .replaceAll('²', '2')
    .replaceAll('^', '')
    .replace(/[^\p{L}\p{N}]+/gu, ' ')
    .trim();
}

const NOUN = '(?:station|site|gauge|gage|stn|gauging station)';
const NUMBER = '(?:code|id|no|number|nr|num|nummer|ref|reference)';

/** What may head each column, best first: the first pattern that some heading fits decides. */
const PATTERNS: Record<'code' | 'name' | 'river' | 'latitude' | 'longitude' | 'influence', RegExp[]> = {
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
  latitude: [/^(lat|latitude|breite)$/, /\b(lat|latitude)\b(?!.*\b(dms|datum|accuracy)\b)/, /^y$/],
  longitude: [
    /^(lon|long|lng|longitude|länge)$/,
    /\b(lon|long|lng|longitude)\b(?!.*\b(dms|datum|accuracy|name)\b)/,
    /^x$/,
  ],
  influence: [/^(influence|influenced|flow influence|influence type)$/],
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
  const areaUnit = find([AREA_UNIT]);
  const areas = plain.flatMap((heading, at) => (at !== areaUnit && AREA.test(heading) ? [at] : []));
  const withUnit = areas.filter((at) => areaFactorOf(headings[at]) !== null);
  const areaKm2 = withUnit[0] ?? areas[0] ?? -1;
  for (const at of areas) taken.add(at);
  // In this order, so that "station" names the station only when another column holds its code.
  const code = find(PATTERNS.code);
  return {
    ...{ code, areaUnit, areaKm2, otherAreas: areas.filter((at) => at !== areaKm2) },
    latitude: find(PATTERNS.latitude),
    longitude: find(PATTERNS.longitude),
    name: find(PATTERNS.name),
    river: find(PATTERNS.river),
    influence: find(PATTERNS.influence),
  };
}

/** km² in one unit of area, exact: a mile is 1609.344 m, an acre 4046.8564224 m² (NIST SP 811, 2008). */
const AREA_UNITS: [RegExp, number][] = [
  [/\b(km ?2|sq ?km|square kilomet(?:er|re)s?|qkm)\b/, 1],
  [/\b(mi ?2|sq ?mi|sq miles?|square miles?|miles? ?2)\b/, 2.589988110336],
  [/\b(ha|hectares?|hektar)\b/, 0.01],
  [/\b(acres?|ac)\b/, 0.0040468564224],
  [/\b(m ?2|sq ?m|square met(?:er|re)s?)\b/, 1e-6],
  // A site table of a public agency that never states its unit: square miles.
  [/^(contrib )?drain area va$/, 2.589988110336],
];

/** km² in one unit of the area that a heading, or a field of the unit column, names; null when it names none. */
export function areaFactorOf(text: string): number | null {
  const plain = plainHeading(text);
  return AREA_UNITS.find(([pattern]) => pattern.test(plain))?.[1] ?? null;
}
