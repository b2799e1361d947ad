'use client';
import { useCallback, useMemo } from 'react';
import { percent, pValue, range, signed, significant } from '@/app/components/format';
import type { WindowCell } from '@/app/components/start-end/draw-windows';
import { StartEndFigure } from '@/app/components/start-end/start-end-figure';
import { ToneLegend } from '@/app/components/start-end/tone-legend';
import { toneOf } from '@/app/components/start-end/tone-steps';
import type { YearWindow } from '@/app/components/start-end/window-grid';
import { type ChartFigure, cellIndex, changesOf, type StartEndAnswer, stepsOf } from './start-end-answer.ts';

interface Props {
  answer: StartEndAnswer;
  name: string;
  alpha: number;
  figure: ChartFigure;
  /** what the two ways of the trend are called */
  ways: TrendWays;
}

export interface TrendWays {
  falling: string;
  rising: string;
}

/** The start–end chart of a station with what its colours mean. */
export function StartEndChart({ answer, name, alpha, figure, ways }: Props) {
  const { starts, ends, z, p } = answer;
  const changes = useMemo(() => changesOf(answer), [answer]);
  const steps = useMemo(() => stepsOf(figure, changes.values), [figure, changes]);
  const cellAt = useCallback(
    (window: YearWindow): WindowCell | null => {
      const index = cellIndex(answer, window);
      const score = index < 0 ? null : z[index];
      if (score === null) return null;
      const sign = Math.sign(score);
      // drier is orange whichever way the figure itself goes
      const size = figure === 'z' ? score : sign * Math.abs(changes.values[index] ?? 0);
      return { sign, tone: toneOf(size, steps), marked: sign !== 0 && (p[index] ?? 1) < alpha };
    },
    [answer, z, p, changes, steps, figure, alpha],
  );
  const whole = useMemo((): YearWindow => [starts[0], ends[ends.length - 1]], [starts, ends]);
  const wordsOf = (window: YearWindow) => {
    const index = cellIndex(answer, window);
    return (
      <>
        <strong>{range(window[0], window[1])}</strong>: {changeWords(changes.values[index], changes.unit)}, Z{' '}
        {signed(z[index], 2)}, p {pValue(p[index])} for this window by itself
      </>
    );
  };
  return (
    <>
      <StartEndFigure
        {...{ starts, ends, cellAt, wordsOf, whole }}
        hint="Point at a cell, or move with the arrow keys, to read the trend of its years."
        label={`Start–end chart of ${name}: the trend for every start year and end year. The table and the file hold the same.`}
      />
      <ToneLegend
        steps={steps}
        name={figure === 'z' ? 'Z' : `${changes.unit || 'Change'} per decade`}
        marked={`p below ${percent(alpha, alpha < 0.01 ? 1 : 0)} by itself`}
        whole="the whole period"
        falling={ways.falling}
        rising={ways.rising}
      />
    </>
  );
}

/** Example: "−4.2 % per decade", "+0.012 m³/s per decade" */
function changeWords(change: number | null, unit: string): string {
  if (change === null) return 'no change in figures';
  const text = unit === '%' ? signed(change, 1) : `${change > 0 ? '+' : ''}${significant(change)}`;
  return `${text}${unit && `\u00a0${unit}`} per decade`;
}
