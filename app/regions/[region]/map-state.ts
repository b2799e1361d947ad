import { createParser, parseAsBoolean, parseAsInteger, parseAsString, parseAsStringLiteral } from 'nuqs';

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
export const USUAL_SPLIT = 44;

/** The screen's state in its address. */
export const mapState = {
  view: createParser<MapView>({ parse: parseView, serialize: viewText, eq: (a, b) => viewText(a) === viewText(b) }),
  station: parseAsString,
  follow: parseAsBoolean.withDefault(true),
  tab: parseAsStringLiteral(TABS).withDefault('ranked'),
  q: parseAsString.withDefault(''),
  split: parseAsInteger.withDefault(USUAL_SPLIT),
};
