import { type Basis, MONTHS } from '../basis.ts';

/** One year's figure, by name, with the months that it is of. Example: "May–October 7-day minimum" */
export function indexOfYear({
  index,
  days,
  season = null,
}: Pick<Basis, 'index' | 'days'> & Partial<Pick<Basis, 'season'>>): string {
  const months = season ? `${MONTHS[season[0] - 1]}–${MONTHS[season[1] - 1]}` : '';
  const of = (figure: string, wholeYear = '') => [months || wholeYear, figure].filter(Boolean).join(' ');
  switch (index) {
    case 'minimum':
      return of(`${days}-day minimum`);
    case 'minimum-date':
      return `date of the ${of(`${days}-day minimum`)}`;
    case 'q95':
      return of('Q95', 'annual');
    case 'mean-flow':
      return of('mean flow', 'annual');
    case 'zero-flow-days':
      return `number of ${of('zero-flow days')}`;
    case 'bfi':
      return of('baseflow index');
    case 'deficit':
      return of('deficit volume below Q90');
  }
}
