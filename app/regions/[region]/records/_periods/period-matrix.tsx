'use client';
import { useState } from 'react';
import { ScrollFrame } from '@/app/components/scroll-frame';
import type { CommonPeriods } from '@/lib/jobs/records-types';
import table from '../_chart/records-table.module.css';
import { layOutPeriods, periodCount } from './period-grid.ts';

/** The chart as a table: stations that each period keeps. */
export function PeriodMatrix({ periods }: { periods: CommonPeriods }) {
  const [open, setOpen] = useState(false);
  const layout = layOutPeriods(periods, 900);
  if (!layout) return null;
  const years = (first: number) => Array.from({ length: layout.count }, (_, index) => first + index);
  return (
    <details className={table.details} onToggle={(event) => setOpen(event.currentTarget.open)}>
      <summary>As a table: stations by start and end year</summary>
      {open && (
        <ScrollFrame className={table.scroll} label="Stations by start and end year">
          <table className={table.table}>
            <caption>Stations that each period keeps: start year at the side, end year above</caption>
            <thead>
              <tr>
                <th scope="col">From</th>
                {years(layout.firstEnd).map((last) => (
                  <th key={last} scope="col">
                    to {last}
                  </th>
                ))}
              </tr>
            </thead>
            <tbody>
              {years(layout.firstStart).map((first) => (
                <tr key={first}>
                  <th scope="row">{first}</th>
                  {years(layout.firstEnd).map((last) => (
                    <td key={last}>{periodCount(periods, first, last)?.ranked ?? ''}</td>
                  ))}
                </tr>
              ))}
            </tbody>
          </table>
        </ScrollFrame>
      )}
    </details>
  );
}
