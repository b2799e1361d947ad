import type { YearCoverage } from '@/lib/jobs/types';

const FLAG_WORDS = [
  ['estimated', 'estimated'],
  ['provisional', 'provisional'],
  ['ice', 'under ice'],
  ['belowDetection', 'below detection'],
  ['suspect', 'suspect'],
  ['rejected', 'rejected'],
] as const;

/** One year's days in words. */
export function coverageText(year: YearCoverage & { label: string }): string {
  const flagged = FLAG_WORDS.filter(([key]) => year.flagged[key] > 0).map(
    ([key, word]) => `${year.flagged[key]} ${word}`,
  );
  const state = { usable: 'the year counts', partial: 'the year does not count', missing: 'no values' }[year.state];
  return [
    `${year.label}: ${year.days - year.missingDays} of ${year.days} days with a value`,
    flagged.length ? ` (${flagged.join(', ')})` : '',
    `; ${state}`,
    year.reason && year.state !== 'missing' ? `: ${year.reason}` : '',
  ].join('');
}
