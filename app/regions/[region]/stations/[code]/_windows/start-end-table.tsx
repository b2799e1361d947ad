'use client';
import { useMemo, useState } from 'react';
import { signed, significant } from '@/app/components/format';
import { ScrollFrame } from '@/app/components/scroll-frame';
import styles from '../station-screen.module.css';
import { type ChartFigure, changesOf, type StartEndAnswer } from './start-end-answer.ts';

/** The chart in figures: start years down, end years across. Made when it is unfolded. */
export function StartEndTable({ answer, figure }: { answer: StartEndAnswer; figure: ChartFigure }) {
  const [open, setOpen] = useState(false);
  return (
    <details className={styles.minimaTable} onToggle={(event) => setOpen(event.currentTarget.open)}>
      <summary>The chart as a table</summary>
      {open && <Figures answer={answer} figure={figure} />}
    </details>
  );
}

function Figures({ answer, figure }: { answer: StartEndAnswer; figure: ChartFigure }) {
  const { starts, ends, z } = answer;
  const { values, unit } = useMemo(() => changesOf(answer), [answer]);
  const shown = figure === 'z' ? z : values;
  const text = (value: number | null) => {
    if (value === null) return '';
    if (figure === 'z') return signed(value, 2);
    return unit === '%' ? signed(value, 1) : significant(value);
  };
  return (
    <ScrollFrame className={styles.scroll} label="Start–end chart as a table">
      <table>
        <caption className="visually-hidden">
          {figure === 'z' ? 'Z' : `${unit || 'Change'} per decade`} by start year (down) and end year (across)
        </caption>
        <thead>
          <tr>
            <th scope="col">From, to</th>
            {ends.map((end) => (
              <th key={end} scope="col">
                {end}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {starts.map((start, row) => (
            <tr key={start}>
              <th scope="row">{start}</th>
              {ends.map((end, column) => (
                <td key={end}>{text(shown[row * ends.length + column])}</td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </ScrollFrame>
  );
}
