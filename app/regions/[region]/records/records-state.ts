import { parseAsBoolean, parseAsInteger, parseAsString, parseAsStringLiteral } from 'nuqs';
import { FINDING_KINDS } from '@/lib/checks/finding';
import { SORTS } from './_chart/sort-stations.ts';

export const SECTIONS = ['years', 'findings', 'periods'] as const;
export type Section = (typeof SECTIONS)[number];

export const FINDING_STATES = ['open', 'rejected', 'accepted', 'noted'] as const;

/** The page's state in its address. `station` and `q` are the map's too, and go along to it. */
export const recordsState = {
  show: parseAsStringLiteral(SECTIONS).withDefault('years'),
  sort: parseAsStringLiteral(SORTS).withDefault('river'),
  reverse: parseAsBoolean.withDefault(false),
  q: parseAsString.withDefault(''),
  station: parseAsString,
  year: parseAsInteger,
  y: parseAsStringLiteral(['log', 'linear'] as const).withDefault('log'),
  kind: parseAsStringLiteral(FINDING_KINDS),
  state: parseAsStringLiteral(FINDING_STATES),
  /** id of a finding at `station` that a link leads to */
  finding: parseAsString,
};
