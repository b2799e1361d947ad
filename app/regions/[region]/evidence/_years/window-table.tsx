'use client';
import { useState } from 'react';
import { fixed, percent } from '@/app/components/format';
import { ScrollFrame } from '@/app/components/scroll-frame';
import table from '../evidence-table.module.css';
import { type WindowCounts, windowShare } from './window-shares.ts';
import styles from './years.module.css';

/** The chart as a table: for every window the share of stations with a falling slope. */
export function WindowTable({ counts, alpha }: { counts: WindowCounts; alpha: string }) {
  const [open, setOpen] = useState(false);
  const { starts, ends } = counts;
  return (
    <details className={table.details} onToggle={(event) => setOpen(event.currentTarget.open)}>
      <summary>As a table: stations by start and end year</summary>
      {open && (
        <ScrollFrame className={styles.tall} label="Stations with a falling slope by start and end year">
          <table className={table.table}>
            <caption>
              <span>
                Stations with a falling slope in percent, and how many fall and rise at the {alpha} level of how many:
                start year at the side, end year above
              </span>
            </caption>
            <thead>
              <tr>
                <th scope="col">From</th>
                {ends.map((end) => (
                  <th key={end} scope="col">
                    to {end}
                  </th>
                ))}
              </tr>
            </thead>
            <tbody>
              {starts.map((start) => (
                <tr key={start}>
                  <th scope="row">{start}</th>
                  {ends.map((end) => {
                    const share = windowShare(counts, [start, end]);
                    return (
                      <td key={end}>
                        {share && (
                          <>
                            {percent(share.negative / share.stations)}
                            <br />
                            <span className={table.quiet}>
                              {fixed(share.falling)}, {fixed(share.rising)} of {fixed(share.stations)}
                            </span>
                          </>
                        )}
                      </td>
                    );
                  })}
                </tr>
              ))}
            </tbody>
          </table>
        </ScrollFrame>
      )}
    </details>
  );
}
