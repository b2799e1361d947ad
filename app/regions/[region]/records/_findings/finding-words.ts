import { count, fixed, flow, percent, significant, specific, type Units } from '@/app/components/format';
import type { FindingKind } from '@/lib/checks/finding';
import type { FindingRow } from '@/lib/jobs/records-types';

export const KIND_WORDS: Record<FindingKind, string> = {
  negative: 'Negative flow',
  repeated: 'Repeated values',
  jump: 'Jump from day to day',
  flat: 'Flat run',
  step: 'Step in the annual mean',
  'unit-change': 'Change of unit',
  future: 'Date in the future',
  'too-large': 'More water than the catchment gives',
};

export const STATE_WORDS: Record<FindingRow['state'], string> = {
  open: 'open',
  rejected: 'rejected',
  accepted: 'accepted',
  noted: 'noted',
};

/** A share that is not nothing is not written as nothing. */
const shareOf = (share: number | null) =>
  share !== null && share > 0 && share < 0.0005 ? 'less than 0.1 %' : percent(share, 1);

/** The figures behind a finding in words; '' where it has none.
 *  Example: a jump → "0.412 m³/s before, 31.2 m³/s after: 75.7 times as much; beyond 12.4 times" */
export function figuresOf({ kind, detail }: Pick<FindingRow, 'kind' | 'detail'>, units: Units): string {
  const number = (name: string): number | null => {
    const value = detail[name];
    return typeof value === 'number' ? value : null;
  };
  const water = (name: string) => flow(number(name), units);
  const more = number('more');
  if (more !== null) return `${fixed(more)} findings of this kind, in one entry: too many to list one by one`;
  switch (kind) {
    case 'negative':
      return `lowest ${water('lowest')}`;
    case 'repeated':
      return `the same values as from ${String(detail.copyOf)} on`;
    case 'jump':
      return `${water('before')} before, ${water('value')} after: a ratio of ${significant(number('ratio'))}, beyond ${significant(number('limit'))}`;
    case 'flat':
      return `${water('value')} every day; ${shareOf(number('share'))} of the record lies in flat runs`;
    case 'step':
      return `mean ${water('meanBefore')} over ${count(number('yearsBefore') ?? 0, 'year')} before, ${water('meanAfter')} over ${count(number('yearsAfter') ?? 0, 'year')} after`;
    case 'unit-change':
      return `${significant(number('ratio'))} times the flow beside it, close to the factor ${significant(number('factor'))} between two units`;
    case 'future':
      return `checked on ${String(detail.today)}`;
    case 'too-large':
      return `up to ${water('highest')}, ${specific((number('specific') ?? Number.NaN) * 1000, units)}`;
  }
}
