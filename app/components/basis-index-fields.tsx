import { useState } from 'react';
import type { AnnualIndexName } from '@/lib/basis';
import { Choices, NumberField } from './basis-fields.tsx';
import type { FieldsProps } from './basis-year-fields.tsx';

const INDEX_CHOICES: readonly (readonly [AnnualIndexName, string, string])[] = [
  ['minimum', 'The lowest flow', 'The lowest n-day mean of each year.'],
  ['q95', 'Q95', 'The flow exceeded on 95 % of the year’s days.'],
  ['mean-flow', 'Mean flow', 'Of all days of the year: is there less water, or only lower lows?'],
  ['zero-flow-days', 'Zero-flow days', 'Stations without a single one are not ranked by them.'],
  ['minimum-date', 'Date of the lowest flow', 'Falling means earlier. One season at a time says most.'],
  ['bfi', 'Baseflow index', 'Share of the flow that comes from storage, by smoothed minima.'],
  ['deficit', 'Deficit volume', 'What is missing to the record’s own Q90, added up over the year.'],
];

/** Which annual figure is compared, and over how many days lows are averaged. */
export function IndexFields({ basis }: FieldsProps) {
  const [index, setIndex] = useState<string>(basis.index);
  const isOfLow = index === 'minimum' || index === 'minimum-date';
  return (
    <>
      <Choices name="index" legend="One figure a year" value={index} onChoose={setIndex} options={INDEX_CHOICES} />
      <NumberField name="days" label="Days averaged" value={basis.days} unit="days">
        {isOfLow
          ? 'The lowest mean of this many days in a row. 7 evens out daily errors and gates; 30 shows drought.'
          : 'Only decides which years are complete enough here: windows of this many days must not be lost to gaps.'}
      </NumberField>
    </>
  );
}
