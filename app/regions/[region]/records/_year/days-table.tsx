'use client';
import { useState } from 'react';
import { MISSING } from '@/app/components/format';
import { ScrollFrame } from '@/app/components/scroll-frame';
import { isoDate } from '@/lib/calendar/day';
import table from '../_chart/records-table.module.css';
import { DAY_FLAGS, type DayColumns, hasFlag } from './days-answer.ts';

interface Props {
  columns: DayColumns;
  label: string;
  flowText(value: number): string;
}

/** The figure's days as a table. */
export function DaysTable({ columns, label, flowText }: Props) {
  const [open, setOpen] = useState(false);
  const { first, values, flags, texts } = columns;
  const days = Array.from(values, (value, at) => ({
    date: isoDate(first + at),
    value,
    flags: flags[at],
    text: texts[at],
  }));
  return (
    <details className={table.details} onToggle={(event) => setOpen(event.currentTarget.open)}>
      <summary>Days as a table</summary>
      {open && (
        <ScrollFrame className={table.scroll} label={`Days of ${label}`}>
          <table className={table.table}>
            <thead>
              <tr>
                <th scope="col">Day</th>
                <th scope="col">Flow</th>
                <th scope="col">Flags</th>
                <th scope="col">As written</th>
              </tr>
            </thead>
            <tbody>
              {days.map((day) => (
                <tr key={day.date}>
                  <th scope="row">{day.date}</th>
                  <td>{Number.isNaN(day.value) ? MISSING : flowText(day.value)}</td>
                  <td>
                    {DAY_FLAGS.filter(({ name }) => hasFlag(day.flags, name))
                      .map(({ words }) => words)
                      .join(', ')}
                  </td>
                  <td>{day.text}</td>
                </tr>
              ))}
            </tbody>
          </table>
        </ScrollFrame>
      )}
    </details>
  );
}
