import { randomStream } from './random.ts';

/** Made-up names. None is meant to be that of a real river or place. */
export const REGION_NAME = 'Vellmarrow basin';

const RIVERS = [
  'Orrowen',
  'Tamsel',
  'Skarrow',
  'Vessick',
  'Ennerith',
  'Foskil',
  'Quernlet',
  'Iskerel',
  'Thrennet',
  'Ulvane',
  'Zennick',
  'Callowbeck',
  'Tiddow',
  'Roswick Water',
  'Gathern',
  'Ambrel',
  'Hallis',
  'Yarrick',
  'Corrow',
  'Snell Burn',
  'Lathering',
  'Wyndle',
  'Ossel',
  'Black Tarrow',
  'Pitherel',
  'Midder',
  'Elsick',
  'Brannoch Water',
  'Harken',
  'Loom',
];
const PLACES = [
  'Stonecradle',
  'Nine Alders',
  'Wrenlock',
  'Emberford',
  'Hallow Weir',
  'Mossgate',
  'Tally Bridge',
  'Cinderholt',
  'Quarrel Mill',
  'Saltern Foot',
  'Ashenbury',
  'Drovers Leap',
  'Kettlewash',
  'Thornspan',
  'Longmere Sluice',
  'Gallowgreen',
  'Cold Hearth',
  'Ravensill',
  'Three Ferries',
  'Underbarrow',
  'Millrace End',
  'Hobbin',
  'Starveling',
  'Low Lanterns',
  'Grieve’s Ford',
  'Widow Bank',
  'Marchstone',
  'Osier Holt',
  'Penny Lock',
  'Harrowgap',
  'Sedgely Staith',
  'Whinmoor',
  'Foxter',
  'Bellwether',
  'Old Tollhouse',
  'Candlewick',
  'Rushey Clough',
  'Tinderbridge',
  'Oxlip',
  'Farthing Weir',
];
const BEGINNINGS = [
  'Bar',
  'Cal',
  'Dun',
  'El',
  'Fen',
  'Gar',
  'Hes',
  'Ill',
  'Kir',
  'Lor',
  'Mar',
  'Nor',
  'Os',
  'Pen',
  'Ren',
  'Sel',
  'Tor',
  'Ul',
  'Wes',
  'Yel',
];
const MIDDLES = ['a', 'e', 'i', 'o', 'an', 'en', 'in', 'ow', 'er', 'ar', 'il', 'um'];
const RIVER_ENDS = ['dle', 'ket', 'mere', 'neth', 'rick', 'sel', 'tow', 'vane', 'wen', 'zel'];
const PLACE_ENDS = ['bury', 'cote', 'ford', 'gate', 'holt', 'lock', 'sluice', 'stow', 'thwaite', 'wick'];

/** Unlike names without end: first the list in its order, then names put together from syllables. */
function* unlikeNames(
  seed: number,
  purpose: string,
  list: readonly string[],
  ends: readonly string[],
): Generator<string> {
  const random = randomStream(seed, 'names', purpose);
  const pick = (from: readonly string[]) => from[random.below(from.length)];
  const used = new Set(list);
  yield* list;
  for (let length = 1; ; length += 1 / 4000) {
    const middle = Array.from({ length: Math.floor(length) }, () => pick(MIDDLES)).join('l');
    const name = pick(BEGINNINGS) + middle + pick(ends);
    if (used.has(name)) continue;
    used.add(name);
    yield name;
  }
}

export const riverNames = (seed: number) => unlikeNames(seed, 'rivers', RIVERS, RIVER_ENDS);
export const placeNames = (seed: number) => unlikeNames(seed, 'places', PLACES, PLACE_ENDS);
