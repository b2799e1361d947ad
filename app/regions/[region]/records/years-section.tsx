'use client';
import dynamic from 'next/dynamic';
import { useSearchParams } from 'next/navigation';
import { useQueryStates } from 'nuqs';
import { useMemo } from 'react';
import { count } from '@/app/components/format';
import { apiHref, yearHref } from '@/app/components/links';
import { Empty, Loading } from '@/app/components/notes';
import ui from '@/app/components/ui.module.css';
import type { RegionRecords } from '@/lib/jobs/records-types';
import { RecordsTable } from './_chart/records-table.tsx';
import { type Sort, sortStations } from './_chart/sort-stations.ts';
import { yearCell } from './_chart/year-cell.ts';
import { YearChart } from './_chart/year-chart.tsx';
import styles from './records-screen.module.css';
import { recordsState } from './records-state.ts';

const YearPanel = dynamic(() => import('./_year/year-panel.tsx').then((part) => part.YearPanel), {
  loading: () => <Loading>Opening the year…</Loading>,
});

const SORT_WORDS: Record<Sort, string> = {
  river: 'river, large to small',
  area: 'drainage area',
  length: 'length of the record',
  end: 'end year',
  complete: 'completeness',
  code: 'code',
  name: 'name',
};

interface Props {
  slug: string;
  records: RegionRecords;
  pending: boolean;
  version: number;
  onChanged(): void;
}

/** All stations by all years, in the order asked for, and the year that is open. */
export function YearsSection({ slug, records, pending, version, onChanged }: Props) {
  const query = useSearchParams();
  const [{ sort, reverse, q, station, year }, set] = useQueryStates(recordsState);
  const rows = useMemo(
    () => sortStations(records.stations, { sort, reverse, search: q }),
    [records.stations, sort, reverse, q],
  );
  const openStation = station === null ? undefined : records.stations.find(({ code }) => code === station);
  const openYear = (code: string, next: number) => void set({ station: code, year: next }, { history: 'push' });
  const sharedQuery = (code: string, next: number) => {
    const to = new URLSearchParams(query);
    to.set('station', code);
    to.set('year', String(next));
    return `${yearHref(slug, code, next).split('?')[0]}?${to}`;
  };
  const { firstYear, lastYear, basis } = records;
  if (firstYear === null || lastYear === null) {
    return (
      <Empty title="No record has a value yet">
        <p>{count(records.stations.length, 'station')} of the region are known, and none has a daily flow so far.</p>
      </Empty>
    );
  }

  return (
    <div className={styles.years} aria-busy={pending}>
      <div className={styles.tools}>
        <label className={ui.label}>
          Sorted by
          <select
            className={ui.select}
            value={sort}
            onChange={(event) => void set({ sort: event.currentTarget.value as Sort })}
          >
            {Object.entries(SORT_WORDS).map(([value, words]) => (
              <option key={value} value={value}>
                {words}
              </option>
            ))}
          </select>
        </label>
        <label className={ui.check}>
          <input
            type="checkbox"
            checked={reverse}
            onChange={(event) => void set({ reverse: event.currentTarget.checked })}
          />
          the other way round
        </label>
        <label className={ui.label}>
          Find
          <input
            className={ui.input}
            type="search"
            placeholder="Name, code or river"
            value={q}
            onChange={(event) =>
              void set({ q: event.currentTarget.value }, { limitUrlUpdates: { method: 'debounce', timeMs: 200 } })
            }
          />
        </label>
        <p className={styles.count} role="status">
          {rows.length === records.stations.length
            ? count(rows.length, 'station')
            : `${rows.length} of ${count(records.stations.length, 'station')}`}
        </p>
        <a className={ui.button} href={apiHref(slug, 'records', query, 'csv')} download>
          Records CSV
        </a>
      </div>
      {rows.length === 0 ? (
        <Empty title="No station answers the search">
          <p>
            Nothing in code, name or river is like “{q}”.{' '}
            <button type="button" className={ui.plain} onClick={() => void set({ q: null })}>
              Show all stations
            </button>
          </p>
        </Empty>
      ) : (
        <YearChart
          records={records}
          span={[firstYear, lastYear]}
          rows={rows}
          sort={sort}
          units={basis.units}
          open={{ station, year }}
          onOpen={openYear}
        />
      )}
      {openStation && year !== null && (
        <YearPanel
          key={openStation.code}
          slug={slug}
          station={openStation}
          year={year}
          cell={yearCell(records, openStation, year)}
          basis={basis}
          version={version}
          onYear={(next) => openYear(openStation.code, next)}
          onClose={() => void set({ year: null })}
          onChanged={onChanged}
        />
      )}
      <RecordsTable records={records} rows={rows} units={basis.units} yearHref={sharedQuery} />
    </div>
  );
}
