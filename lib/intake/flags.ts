import { FLAG } from '../series/daily-series.ts';

const WORDS: Record<string, number> = {
  e: FLAG.estimated,
  est: FLAG.estimated,
  estimate: FLAG.estimated,
  estimated: FLAG.estimated,
  infilled: FLAG.estimated,
  interpolated: FLAG.estimated,
  p: FLAG.provisional,
  prov: FLAG.provisional,
  provisional: FLAG.provisional,
  preliminary: FLAG.provisional,
  unverified: FLAG.provisional,
  unchecked: FLAG.provisional,
  ice: FLAG.ice,
  eis: FLAG.ice,
  frozen: FLAG.ice,
  bdl: FLAG['below-detection'],
  '<': FLAG['below-detection'],
  suspect: FLAG.suspect,
  suspicious: FLAG.suspect,
  doubtful: FLAG.suspect,
  questionable: FLAG.suspect,
  unreliable: FLAG.suspect,
};

/** Flag bits of a quality code as written, upper and lower case alike: `A` (approved) → 0, `A:e` → estimated,
 *  `P:e` → provisional and estimated, `Ice` → ice, `<` → below detection. Words that say nothing of these give no bits.
 *  @param iceLetter  a further letter that means ice in this file's column of symbols */
export function flagBits(text: string, iceLetter?: string): number {
  let bits = 0;
  for (const word of text.toLowerCase().match(/[\p{L}]+|</gu) ?? []) {
    if (Object.hasOwn(WORDS, word)) bits |= WORDS[word];
    else if (word === iceLetter?.toLowerCase()) bits |= FLAG.ice;
  }
  return bits;
}
