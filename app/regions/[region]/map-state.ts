import { createParser, parseAsBoolean, parseAsInteger, parseAsString, parseAsStringLiteral } from 'nuqs';
import { MOST_STEEPEST, USUAL_STEEPEST } from '@/lib/region/certainty-types';

export interface MapView {
  latitude: number;
  longitude: number;
  zoom: number;
}

/** "46.0512,14.5060,8" and back; anything else is no view. */
export const parseView = (text: string): MapView | null => {
  const parts = text.split(',').map(Number);
  const [latitude, longitude, zoom] = parts;
  if (parts.length !== 3 || !parts.every(Number.isFinite)) return null;
  if (Math.abs(latitude) > 90 || Math.abs(longitude) > 540 || zoom < 0 || zoom > 20) return null;
  return { latitude, longitude, zoom };
};

export const viewText = ({ latitude, longitude, zoom }: MapView): string =>
  `${latitude.toFixed(4)},${longitude.toFixed(4)},${Number(zoom.toFixed(2))}`;

const TABS = ['ranked', 'drying', 'unranked'] as const;
export type Tab = (typeof TABS)[number];

/** Share of the width that the map has, percent. */
export const USUAL_SPLIT = 40;

const FILLS = ['significance', 'steepest', 'span'] as const;
/** What the discs' filling says: whether a trend is significant, how likely the station is among the k steepest declines,
 *  or how narrow its rank span is. */
export type Fill = (typeof FILLS)[number];

/** "among the k steepest": a whole number from 1 to as many as are simulated; anything else is no number. */
export const parseSteepest = (text: string): number | null =>
  /^\d{1,3}$/.test(text) && Number(text) >= 1 && Number(text) <= MOST_STEEPEST ? Number(text) : null;

/** The screen's state in its address. */
export const mapState = {
  view: createParser<MapView>({ parse: parseView, serialize: viewText, eq: (a, b) => viewText(a) === viewText(b) }),
  station: parseAsString,
  follow: parseAsBoolean.withDefault(true),
  tab: parseAsStringLiteral(TABS).withDefault('ranked'),
  q: parseAsString.withDefault(''),
  split: parseAsInteger.withDefault(USUAL_SPLIT),
  k: createParser<number>({ parse: parseSteepest, serialize: String }).withDefault(USUAL_STEEPEST),
  fill: parseAsStringLiteral(FILLS).withDefault('significance'),
};
