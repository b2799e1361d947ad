'use client';
import { useEffect, useId, useState } from 'react';
import { LineSwatch } from '@/app/components/duration-figure/line-swatch';
import { fixed } from '@/app/components/format';
import ui from '@/app/components/ui.module.css';
import { FIRST_CHOICE, type StationChoice } from './curves-view';
import type { LeftOutStation } from './left-out';
import styles from './station-picker.module.css';

export interface PickableStation {
  code: string;
  name: string;
  river: string;
  rank: number | null;
  latitude: number | null;
  longitude: number | null;
}

interface Props {
  stations: readonly PickableStation[];
  chosen: readonly string[];
  /** codes with a labelled line, in the order of their looks */
  lines: readonly string[];
  choice: StationChoice;
  leftOut: readonly LeftOutStation[];
  hasMapView: boolean;
  onChoose(choice: StationChoice): void;
}

/** Rows put into the page at once; a search finds the others. */
const MOST_ROWS = 200;

/** Which stations the figure shows: by search and tick, or a whole set at once. */
export function StationPicker({ stations, chosen, lines, choice, leftOut, hasMapView, onChoose }: Props) {
  const [search, setSearch] = useState('');
  const [open, setOpen] = useState(true);
  // On a narrow screen the list would stand between the reader and the figure.
  useEffect(() => setOpen(!window.matchMedia('(max-width: 900px)').matches), []);
  const searchId = useId();
  const ticked = new Set(chosen);
  const reasons = new Map(leftOut.map((station) => [station.code, station.reason]));
  const wanted = search.trim().toLowerCase();
  const found = stations.filter((station) =>
    `${station.name} ${station.code} ${station.river}`.toLowerCase().includes(wanted),
  );
  const tick = (code: string, on: boolean) => {
    const codes = stations.map((station) => station.code).filter((other) => (other === code ? on : ticked.has(other)));
    onChoose({ way: 'codes', codes });
  };
  const ways: { label: string; choice: StationChoice; on: boolean }[] = [
    { label: `${FIRST_CHOICE} steepest`, choice: { way: 'steepest' }, on: choice.way === 'steepest' },
    ...(hasMapView
      ? [{ label: 'in view of the map', choice: { way: 'view' } as const, on: choice.way === 'view' }]
      : []),
    { label: 'all', choice: { way: 'all' }, on: choice.way === 'all' },
    { label: 'none', choice: { way: 'codes', codes: [] }, on: choice.way === 'codes' && chosen.length === 0 },
  ];
  return (
    <details className={styles.picker} open={open} onToggle={(event) => setOpen(event.currentTarget.open)}>
      <summary>
        <h2>Stations</h2>
        <span>
          {fixed(chosen.length)} of {fixed(stations.length)}
        </span>
      </summary>
      <div className={styles.body}>
        <div className={styles.ways}>
          {ways.map((way) => (
            <button
              key={way.label}
              type="button"
              className={styles.way}
              aria-pressed={way.on}
              onClick={() => onChoose(way.choice)}
            >
              {way.label}
            </button>
          ))}
        </div>
        <label htmlFor={searchId} className="visually-hidden">
          Search stations by name, code or river
        </label>
        <input
          id={searchId}
          type="search"
          className={ui.input}
          placeholder="Name, code or river"
          value={search}
          onChange={(event) => setSearch(event.target.value)}
        />
        <ul className={styles.list}>
          {found.slice(0, MOST_ROWS).map((station) => {
            const line = lines.indexOf(station.code);
            const reason = reasons.get(station.code);
            return (
              <li key={station.code}>
                <label className={styles.row} title={reason}>
                  <input
                    type="checkbox"
                    checked={ticked.has(station.code)}
                    onChange={(event) => tick(station.code, event.target.checked)}
                  />
                  <span className={styles.name}>
                    {station.name}
                    {reason && <small>no curve on these terms</small>}
                  </span>
                  {line >= 0 && <LineSwatch index={line} />}
                  <span className={styles.rank}>{station.rank === null ? '' : `no. ${station.rank}`}</span>
                </label>
              </li>
            );
          })}
        </ul>
        {found.length === 0 && <p className={ui.hint}>No station is called that.</p>}
        {found.length > MOST_ROWS && (
          <p className={ui.hint}>{fixed(found.length - MOST_ROWS)} more: a search narrows the list.</p>
        )}
      </div>
    </details>
  );
}
