'use client';
import { useCallback, useMemo } from 'react';
import { LongWait } from '@/app/components/long-wait';
import { Segmented } from '@/app/components/segmented';
import { StartEndFigure } from '@/app/components/start-end/start-end-figure';
import { ToneLegend } from '@/app/components/start-end/tone-legend';
import type { YearWindow } from '@/app/components/start-end/window-grid';
import type { LongResult } from '@/app/components/use-long-result';
import styles from '../evidence.module.css';
import type { YearFigure } from '../evidence-state.ts';
import { Section } from '../section.tsx';
import { regionCell, regionSteps } from './region-cell.ts';
import { type WindowCounts, windowShare } from './window-shares.ts';
import { WindowTable } from './window-table.tsx';
import { windowWords, yearsOf } from './window-words.ts';

const FIGURES: readonly { value: YearFigure; label: string; title: string }[] = [
  { value: 'sign', label: 'slopes', title: 'Share of stations with a falling slope' },
  {
    value: 'significant',
    label: 'beyond chance',
    title: 'Stations that fall, less those that rise, each by its own test',
  },
];

interface Props {
  answer: LongResult<WindowCounts>;
  figure: YearFigure;
  onFigure(figure: YearFigure): void;
  /** the years of the basis */
  period: YearWindow | null;
  alpha: string;
  csv: string | null;
}

/** How the answer depends on the years: the share of stations that fall, for every start year and end year. */
export function YearsSection({ answer, figure, onFigure, period, alpha, csv }: Props) {
  const { value } = answer;
  const steps = useMemo(() => regionSteps(figure), [figure]);
  const cellAt = useCallback(
    (window: YearWindow) => {
      const share = value && windowShare(value, window);
      return share ? regionCell(share, figure) : null;
    },
    [value, figure],
  );
  return (
    <Section
      id="years"
      title="By the years chosen"
      lead="A trend of the last forty years need not be one of the last sixty. Each cell is a window of years: its start year at the side, its end year above, at least 15 usable years between. Windows overlap, so their agreement is not independent evidence."
      csv={csv}
      csvName="Windows CSV"
      method="start-end-chart"
    >
      <LongWait answer={answer} title="Testing every window of years" failed="The windows could not be tested" />
      {value &&
        (value.starts.length === 0 ? (
          <p>No ranked station has 15 usable years, so no window can be tested.</p>
        ) : (
          <div className={styles.body} aria-busy={answer.pending}>
            <Segmented label="Cells show" value={figure} options={FIGURES} onChange={onFigure} />
            <StartEndFigure
              starts={value.starts}
              ends={value.ends}
              cellAt={cellAt}
              wordsOf={(window) => {
                const share = windowShare(value, window);
                return (
                  <>
                    <strong>{yearsOf(window)}</strong>:{' '}
                    {share ? windowWords(share, alpha) : 'no station has the window'}
                  </>
                );
              }}
              hint="Point at a cell, or move with the arrow keys, to read a window."
              whole={period}
              label="Share of stations that fall, by start year and end year. The table below holds the same."
            />
            <ToneLegend
              steps={steps}
              name={figure === 'sign' ? 'Percent of stations on that side' : 'Percent of stations, falling less rising'}
              marked={null}
              whole={period && 'the years of the basis'}
            />
            <WindowTable counts={value} alpha={alpha} />
          </div>
        ))}
    </Section>
  );
}
