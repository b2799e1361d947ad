/** What the workers can do, one named task each. Bundled to .build/worker.mjs; no Prisma comes in here, so that a
 *  worker starts quickly. */
export { annualIndex } from './tasks/annual-index.ts';
export { certainty, certaintyTerms, simulate } from './tasks/certainty.ts';
export { permuteYears, seriesForChance, settleYears, sieveYears } from './tasks/chance.ts';
export { checkRecords } from './tasks/check-records.ts';
export { commonPeriods } from './tasks/common-periods.ts';
export { correlatedFlows } from './tasks/correlated-flows.ts';
export { coverage } from './tasks/coverage.ts';
export { curves } from './tasks/curves.ts';
export { lookAtFiles } from './tasks/look-at-files.ts';
export { minima } from './tasks/minima.ts';
export { pair } from './tasks/pair.ts';
export { rank } from './tasks/rank.ts';
export { regimes } from './tasks/regimes.ts';
export { regionBreaks } from './tasks/region-breaks.ts';
export { regional } from './tasks/regional.ts';
export { startEndCounts } from './tasks/start-end-counts.ts';
export { suggestLinks } from './tasks/suggest-links.ts';
export { takeFiles } from './tasks/take-files.ts';
export { weather } from './tasks/weather.ts';
export { weeklyFlows } from './tasks/weekly-flows.ts';
export { yearDays } from './tasks/year-days.ts';
