import { parseAsString, parseAsStringLiteral } from 'nuqs';
import type { ChanceMethod } from '@/lib/region/regional-types';

const CHANCE_METHODS = ['permutation', 'sieve'] as const satisfies readonly ChanceMethod[];

/** What the cells of the chart by years show: the sign of the slope, or what is beyond chance station by station. */
const YEAR_FIGURES = ['sign', 'significant'] as const;
export type YearFigure = (typeof YEAR_FIGURES)[number];

/** The page's state in its address, beside the basis. */
export const evidenceState = {
  /** how chance is imitated */
  chance: parseAsStringLiteral(CHANCE_METHODS).withDefault('permutation'),
  /** corners of a drawn group, see in-polygon.ts */
  area: parseAsString,
  years: parseAsStringLiteral(YEAR_FIGURES).withDefault('sign'),
  /** first low-flow years after the chosen breaks, with commas between; null: each station's own dated changes */
  breaks: parseAsString,
};

/** The sections in the order in which they answer; the ids are their anchors in an address. */
export const SECTIONS = [
  { id: 'chance', label: 'Beyond chance' },
  { id: 'common', label: 'One common trend' },
  { id: 'years', label: 'By the years chosen' },
  { id: 'terms', label: 'By the terms chosen' },
  { id: 'breaks', label: 'Before and after' },
] as const;
export type SectionId = (typeof SECTIONS)[number]['id'];
