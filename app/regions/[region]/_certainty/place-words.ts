import { count, MISSING, range, shareText } from '@/app/components/format';
import { needleOf } from '@/app/components/needle';
import type { MapRow } from '../map-row.ts';
import { amongSteepest, type CertaintyView } from './certainty-view.ts';
import { type DetectableTerms, detectableText } from './detectable-text.ts';

/** "5 steepest declines", "steepest decline". */
const steepestWords = (k: number): string => (k === 1 ? 'steepest decline' : `${k} steepest declines`);

/** "among the 5 steepest declines", "the steepest decline". */
export const amongWords = (k: number): string => `${k === 1 ? '' : 'among '}the ${steepestWords(k)}`;

/** How sure a station's place is, and what its record could have shown, in one sentence; empty while it is not known.
 *  Example: "Place 4–19 of 33 with 90 % certainty; among the 5 steepest declines with a probability of 37 %." */
export function placeWords(
  view: CertaintyView | null,
  row: MapRow,
  k: number,
  terms: Omit<DetectableTerms, 'drying'>,
): string {
  if (!view) return '';
  const parts: string[] = [];
  const span = view.spans.get(row.code);
  if (span) {
    const place = span.rankLow === span.rankHigh ? span.rankLow : range(span.rankLow, span.rankHigh);
    parts.push(`place ${place} of ${view.places} with 90 % certainty`);
    parts.push(`${amongWords(k)} with a probability of ${shareText(amongSteepest(view, row.code, k))}`);
  }
  const shown = detectableText(view.detectable.get(row.code), { ...terms, drying: row.drying });
  if (!needleOf(row).significant && shown !== MISSING) {
    parts.push(`${shown} per decade or more would have shown in four cases of five`);
  }
  const text = parts.join('; ');
  return text && `${text[0].toUpperCase()}${text.slice(1)}.`;
}

/** What the spans say of the region as a whole. Example: "These stations cannot be told apart: …" */
export function toldApartWords({ toldApart, places }: CertaintyView): string {
  if (toldApart) return '';
  return `These stations cannot be told apart: their trends differ by no more than chance would make them, so every one of the ${count(places, 'place')} is open to each.`;
}
