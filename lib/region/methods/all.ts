import type { MethodChapter } from './definition.ts';
import { minimaChapter } from './minima.ts';
import { regionChapter } from './region.ts';
import { sensitivityChapter } from './sensitivity.ts';
import { trendChapter } from './trend.ts';

/** Every method that stands behind a figure of the program, in the order of the methods page. */
export const METHOD_CHAPTERS: readonly MethodChapter[] = [
  minimaChapter,
  trendChapter,
  regionChapter,
  sensitivityChapter,
];
