'use client';
import Link from 'next/link';
import { useState } from 'react';
import { changeText } from '@/app/components/change-marks/marked-changes';
import { areaNumber, count, fixed, percent, UNIT_WORDS, type Units } from '@/app/components/format';
import { ScrollFrame } from '@/app/components/scroll-frame';
import ui from '@/app/components/ui.module.css';
import { lowFlowYearLabel } from '@/lib/calendar/low-flow-year';
import { COUNTED_FLAGS, type RegionRecords } from '@/lib/jobs/records-types';
import styles from './records-table.module.css';
import type { Sorted } from './sort-stations.ts';
import { changesIn, FLAG_WORDS, stateWords, yearCell } from './year-cell.ts';

interface Props {
  records: RegionRecords;
  rows: readonly Sorted[];
  units: Units;
  yearHref(code: string, year: number): string;
}

/** Rows that are put into the page at once. */
const PAGE = 100;

/** The chart's content as tables: a row a station, and on asking the years of one of them. */
export function RecordsTable({ records, rows, units, yearHref }: Props) {
  const [open, setOpen] = useState(false);
  const [shown, setShown] = useState(PAGE);
  const [code, setCode] = useState<string | null>(null);
  const chosen = rows.find(({ station }) => station.code === code);
  return (
    <details className={styles.details} onToggle={(event) => setOpen(event.currentTarget.open)}>
      <summary>As a table: {count(rows.length, 'station')}</summary>
      {open && (
        <>
          <ScrollFrame className={styles.scroll} label="Records by station">
            <table className={styles.table}>
              <thead>
                <tr>
                  <th scope="col">Station</th>
                  <th scope="col">Code</th>
                  <th scope="col">River</th>
                  <th scope="col">{UNIT_WORDS[units].area}</th>
                  <th scope="col">First year</th>
                  <th scope="col">Last year</th>
                  <th scope="col">Years with values</th>
                  <th scope="col">Years that count</th>
                  <th scope="col">Complete</th>
                </tr>
              </thead>
              <tbody>
                {rows.slice(0, shown).map(({ station, span }) => (
                  <tr key={station.code}>
                    <th scope="row">
                      <button
                        type="button"
                        className={ui.plain}
                        aria-expanded={station.code === code}
                        onClick={() => setCode(station.code === code ? null : station.code)}
                      >
                        {station.name}
                      </button>
                    </th>
                    <td>{station.code}</td>
                    <td>{station.river}</td>
                    <td>{areaNumber(station.areaKm2, units)}</td>
                    <td>{span.first ?? '–'}</td>
                    <td>{span.last ?? '–'}</td>
                    <td>{fixed(span.years)}</td>
                    <td>{fixed(span.counting)}</td>
                    <td>{percent(span.complete)}</td>
                  </tr>
                ))}
              </tbody>
            </table>
          </ScrollFrame>
          {shown < rows.length && (
            <button type="button" className={ui.button} onClick={() => setShown(shown + PAGE)}>
              Show {Math.min(PAGE, rows.length - shown)} more of {fixed(rows.length)}
            </button>
          )}
          {chosen && <YearsTable records={records} row={chosen} yearHref={yearHref} />}
        </>
      )}
    </details>
  );
}

function YearsTable({ records, row, yearHref }: { records: RegionRecords; row: Sorted; yearHref: Props['yearHref'] }) {
  const { station } = row;
  const years = station.values.map((_, index) => (station.firstYear ?? 0) + index);
  const flags = COUNTED_FLAGS.filter((flag) => station.flagged[flag]);
  return (
    <ScrollFrame className={styles.scroll} label={`Years of ${station.name}`}>
      <table className={styles.table}>
        <caption>Years of {station.name}: days</caption>
        <thead>
          <tr>
            <th scope="col">Year</th>
            <th scope="col">with a value</th>
            <th scope="col">without</th>
            {flags.map((flag) => (
              <th key={flag} scope="col">
                {FLAG_WORDS[flag]}
              </th>
            ))}
            <th scope="col" className={styles.words}>
              Under the basis
            </th>
          </tr>
        </thead>
        <tbody>
          {years.map((year) => {
            const cell = yearCell(records, station, year);
            if (!cell) return null;
            return (
              <tr key={year}>
                <th scope="row">
                  <Link href={yearHref(station.code, year)} prefetch={false} scroll={false}>
                    {lowFlowYearLabel(year, records.basis.yearStart)}
                  </Link>
                </th>
                <td>{cell.values}</td>
                <td>{cell.days - cell.values}</td>
                {flags.map((flag) => (
                  <td key={flag}>{cell.flagged[flag]}</td>
                ))}
                <td className={styles.words}>
                  {[stateWords(cell), ...changesIn(station, year, records.basis.yearStart).map(changeText)].join('; ')}
                </td>
              </tr>
            );
          })}
        </tbody>
      </table>
    </ScrollFrame>
  );
}
