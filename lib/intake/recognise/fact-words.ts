/** What a line above a table states, by the words before its colon. */
export type FactKind = 'code' | 'station' | 'name' | 'river' | 'latitude' | 'longitude' | 'area' | 'unit';

const words = (text: string): Set<string> => new Set(text.split(' '));

/** Words of a key in English, German, French, Spanish, Portuguese, Swedish and Dutch; marks over letters are left out. */
const STATION = words(
  'station stn site gauge gage gauging messstelle messstation pegel pegelstation mesure estacion estacao posto matstation mätstation meetstation meetpunt',
);
const NUMBER = words(
  'no nr num number nummer numero numer id code codigo kod kode kennung kennziffer identifier identificador reference ref',
);
const NAME = words('name nom nombre nome naam namn bezeichnung designation');
const RIVER = words(
  'river stream watercourse waterbody gewasser fluss bach riviere cours cauce rio curso vattendrag flod rivier waterloop waterweg',
);
const LATITUDE = words(
  'lat latitude breite breitengrad latitud breddgrad breedtegraad noorderbreedte nordlichebreite geobreite',
);
const LONGITUDE = words('lon long lng longitude lange langengrad longitud longitudgrad langdgrad lengtegraad geolange');
const AREA = words(
  'area catchment drainage basin einzugsgebiet einzugsgebietsflache einzugsgebietsgrosse superficie surface bassin versant cuenca drenaje bacia drenagem avrinningsomrade avrinningsomradets areal stroomgebied oppervlakte',
);
const UNIT = words('unit units einheit einheiten masseinheit unite unites unidad unidades unidade enhet eenheid');
/** Words that make a key no other key for standing beside them. */
const ARTICLES = words(
  'the of de la le du des del da do der die das des d l et and af av van von dd deg degrees grad wgs84 wgs 84 decimal dezimal etrs89 measure measurement messung dates data km2 mi2 km2 ha size total geographische geographic geographical geogr geo orogr orographic',
);

/** Words written as one: "Stationsnummer", "Messstellenname", "Gewässername". */
const COMPOUNDS: [RegExp, FactKind][] = [
  [
    /^(?:mess?)?(?:station|stations|stelle|messstellen?|pegel|matstations?|meetstations?|meetpunt)s?(?:nummer|nr|no|id|code|kod|kennung)$/,
    'code',
  ],
  [
    /^(?:station|stations|messstellen?|pegel|matstations?|meetpunt|site|gauge)s?(?:name|namn|naam|bezeichnung)$/,
    'name',
  ],
  [/^(?:gewasser|fluss|river|vattendrags|rivier)(?:name|namn|naam)$/, 'river'],
  [/^(?:site|station|gauge)(?:no|number|id|code)$/, 'code'],
];

/** "Catchment area (km²)" → catchment, area */
function keyWords(key: string): string[] {
  return key
    .replace(/[([][^)\]]*[)\]]/g, ' ')
    .replace(/(\p{Ll})(\p{Lu})/gu, '$1 $2')
    .replaceAll('ß', 'ss')
    .normalize('NFD')
    .replace(/\p{M}/gu, '')
    .toLowerCase()
    .split(/[^\p{L}\p{N}]+/u)
    .filter((word) => word !== '');
}

/** What a key announces; null for keys of other matters. A key counts only when nothing in it is of another matter:
 *  "Next downstream station" is not the station, "Country code" not its number.
 *  @returns `station` for a bare "Station:", whose value may be a name or a number */
export function factOfKey(key: string): FactKind | null {
  const found = keyWords(key).filter((word) => !ARTICLES.has(word));
  if (found.length === 0 || found.length > 4) return null;
  if (found.length === 1) {
    const compound = COMPOUNDS.find(([pattern]) => pattern.test(found[0]));
    if (compound) return compound[1];
  }
  const only = (...sets: Set<string>[]) => found.every((word) => sets.some((set) => set.has(word)));
  const some = (set: Set<string>) => found.some((word) => set.has(word));
  if (only(UNIT)) return 'unit';
  if (only(LATITUDE, STATION) && some(LATITUDE)) return 'latitude';
  if (only(LONGITUDE, STATION) && some(LONGITUDE)) return 'longitude';
  if (only(RIVER, NAME, words('eau agua water')) && some(RIVER)) return 'river';
  if (only(AREA, STATION, RIVER) && some(AREA)) return 'area';
  if (only(STATION, NUMBER) && some(NUMBER)) return 'code';
  if (only(STATION, NAME) && some(NAME)) return 'name';
  if (only(STATION)) return 'station';
  // An office's own numbers: "XYZ-No."
  const [office, number] = found;
  const written = key.trim().split(/[^\p{L}\p{N}]+/u)[0];
  const isOffice = found.length === 2 && NUMBER.has(number) && /^\p{Lu}{2,6}$/u.test(written);
  return isOffice && office.length <= 6 ? 'code' : null;
}
