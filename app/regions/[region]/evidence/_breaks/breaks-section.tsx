'use client';
import { count, type Units } from '@/app/components/format';
import { LongWait } from '@/app/components/long-wait';
import type { LongResult } from '@/app/components/use-long-result';
import type { RegionBreaks } from '@/lib/region/break-types';
import styles from '../evidence.module.css';
import table from '../evidence-table.module.css';
import { Section } from '../section.tsx';
import { BreakChooser } from './break-chooser.tsx';
import { BreakTable } from './break-table.tsx';
import { summaryWords } from './break-words.ts';
import own from './breaks.module.css';

interface Props {
  answer: LongResult<RegionBreaks>;
  years: readonly number[];
  span: readonly [number, number];
  labelOf(year: number): string;
  onYears(years: number[]): void;
  alpha: number;
  units: Units;
  csv: string | null;
  hrefOf(code: string): string;
}

/** Levels before and after breaks that were known beforehand. */
export function BreaksSection({ answer, years, span, labelOf, onYears, alpha, units, csv, hrefOf }: Props) {
  const { value } = answer;
  const leftOut = value?.stations.flatMap(({ name, leftOut }) => leftOut.map((one) => ({ name, ...one }))) ?? [];
  return (
    <Section
      id="breaks"
      title="Before and after"
      lead="A dam, a new abstraction or a new rule parts the years at a date that is known without the flows. Choose such a break, or take each station’s own dated changes. A break chosen because the flows show one there is bound to test well; and a break is not a cause."
      csv={csv}
      csvName="Breaks CSV"
      method="before-after"
    >
      <BreakChooser years={years} span={span} labelOf={labelOf} onChange={onYears} />
      <LongWait answer={answer} title="Comparing before and after" failed="Before and after could not be compared" />
      {value && (
        <div className={styles.body} aria-busy={answer.pending}>
          {value.summary.length === 0 ? (
            <p>
              {years.length === 0
                ? 'No ranked station has a dated change with years on both sides. Choose a break above, or write the changes into the stations’ facts.'
                : 'No ranked station has years on both sides of a break.'}
            </p>
          ) : (
            <ul className={own.summary}>
              {value.summary.map((summary) => (
                <li key={summary.label}>{summaryWords(summary)}</li>
              ))}
            </ul>
          )}
          <BreakTable stations={value.stations} alpha={alpha} units={units} hrefOf={hrefOf} />
          {leftOut.length > 0 && (
            <details className={table.details}>
              <summary>{count(leftOut.length, 'break has', 'breaks have')} too few usable years on a side</summary>
              <ul className={own.summary}>
                {leftOut.map(({ name, break: known, reason }) => (
                  <li key={`${name} ${known.year}`}>
                    {name}, {known.words}: {reason}
                  </li>
                ))}
              </ul>
            </details>
          )}
        </div>
      )}
    </Section>
  );
}
