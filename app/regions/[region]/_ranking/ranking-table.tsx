'use client';
import { useVirtualizer } from '@tanstack/react-virtual';
import { useSearchParams } from 'next/navigation';
import { type KeyboardEvent, type MouseEvent, type PointerEvent, useEffect, useMemo, useRef, useState } from 'react';
import { UNIT_WORDS, type Units } from '@/app/components/format';
import { IntervalAxis, intervalScale } from '@/app/components/interval-figure';
import { stationHref } from '@/app/components/links';
import type { AnnualIndexName } from '@/lib/basis';
import { INDEX_WORDS } from '@/lib/region/index-words';
import type { HoverStore } from '../hover-store.ts';
import type { MapRow } from '../map-row.ts';
import { axisTicks, type FigureKind, figureWords } from './figure-words.ts';
import styles from './ranking-table.module.css';
import { type Moved, StationRow } from './station-row.tsx';
import type { Sureness } from './sureness-cells.tsx';

/** Height of a row in pixels, the same in the style sheet: the list knows where each row lies without measuring. */
const ROW = 48;

interface RankingTableProps {
  slug: string;
  caption: string;
  rows: MapRow[];
  /** all rows of the list, in view or not: the interval's scale must not change while the map moves */
  all: MapRow[];
  figure: FigureKind;
  /** what is compared, and what the small figures show */
  index: AnnualIndexName;
  units: Units;
  span: [number, number];
  hover: HoverStore;
  selected: string | null;
  onSelect: (code: string | null) => void;
  /** null for a list without places */
  sureness: Sureness | null;
  /** against the region's own terms; null while there is nothing to compare */
  movedOf: ((code: string) => Moved | null) | null;
  /** the trend that a record would have shown, for stations without a significant one */
  detectableOf: (row: MapRow) => string | null;
}

/** The list of ranked (or drying) stations. Only rows in sight are in the page. Pointing at a row points at its mark;
 *  a click selects it; the name leads to the station's page. By keyboard: arrows go through the rows, Space selects,
 *  Enter opens. */
export function RankingTable(props: RankingTableProps) {
  const { slug, caption, rows, all, figure, units, span, hover, selected, onSelect, index } = props;
  const { sureness, movedOf, detectableOf } = props;
  const query = useSearchParams().toString();
  const box = useRef<HTMLDivElement>(null);
  const [active, setActive] = useState(0);
  const words = useMemo(() => figureWords(figure, units), [figure, units]);
  const scale = useMemo(() => {
    if (words.intervalHeading === null) return null;
    return intervalScale(all.flatMap((row) => [words.shown(row.figure.low), words.shown(row.figure.high)]));
  }, [all, words]);

  const list = useVirtualizer({
    count: rows.length,
    getScrollElement: () => box.current,
    estimateSize: () => ROW,
    overscan: 6,
    // what the server writes, so that the first rows stand before any script has run
    initialRect: { width: 640, height: 18 * ROW },
    scrollPaddingStart: 44,
  });

  const tabbable = Math.min(active, rows.length - 1);

  // a selection made on the map is brought into sight
  const place = selected === null ? -1 : rows.findIndex((row) => row.code === selected);
  useEffect(() => {
    if (place >= 0) list.scrollToIndex(place, { align: 'auto' });
  }, [place, list]);

  const focusRow = (index: number) => {
    const next = Math.max(0, Math.min(rows.length - 1, index));
    list.scrollToIndex(next, { align: 'auto' });
    setActive(next);
    hover.set(rows[next].code);
    // the row may only now come into the page
    requestAnimationFrame(() =>
      requestAnimationFrame(() =>
        box.current?.querySelector<HTMLElement>(`tr[aria-rowindex="${next + 2}"] a`)?.focus({ preventScroll: true }),
      ),
    );
  };

  const onKeyDown = (event: KeyboardEvent) => {
    const code = codeUnder(event.target);
    if (code === null || event.altKey || event.ctrlKey || event.metaKey) return;
    const here = rows.findIndex((row) => row.code === code);
    const page = Math.max(1, Math.floor((box.current?.clientHeight ?? ROW) / ROW) - 2);
    const goTo: Record<string, number> = {
      ArrowDown: here + 1,
      ArrowUp: here - 1,
      PageDown: here + page,
      PageUp: here - page,
      Home: 0,
      End: rows.length - 1,
    };
    if (event.key in goTo) focusRow(goTo[event.key]);
    else if (event.key === ' ') onSelect(code === selected ? null : code);
    else if (event.key === 'Escape') onSelect(null);
    else return;
    event.preventDefault();
  };

  const onClick = (event: MouseEvent) => {
    // the name is a link and goes its own way
    if (event.target instanceof Element && event.target.closest('a')) return;
    const code = codeUnder(event.target);
    if (code !== null) onSelect(code === selected ? null : code);
  };

  const items = list.getVirtualItems();
  const before = items[0]?.start ?? 0;
  const after = list.getTotalSize() - (items[items.length - 1]?.end ?? 0);
  return (
    <div ref={box} className={styles.scroll}>
      <table
        className={styles.table}
        aria-rowcount={rows.length + 1}
        onKeyDown={onKeyDown}
        onClick={onClick}
        onPointerMove={(event: PointerEvent) => hover.set(codeUnder(event.target))}
        onPointerLeave={() => hover.set(null)}
        onFocus={(event) => {
          const code = codeUnder(event.target);
          hover.set(code);
          const index = rows.findIndex((row) => row.code === code);
          if (index >= 0) setActive(index);
        }}
        onBlur={() => hover.set(null)}
      >
        <caption className="visually-hidden">{caption}</caption>
        <thead>
          <tr aria-rowindex={1}>
            <th scope="col" className={styles.rank}>
              {figure === 'zero-days' ? <span className="visually-hidden">No rank</span> : 'Rank'}
              {movedOf && sureness && <span className={`${styles.under} ${styles.moved}`}>moved</span>}
              {sureness && <span className={styles.spanText}>span</span>}
            </th>
            <th scope="col" className={styles.station}>
              Station
            </th>
            <th scope="col" className={styles.area}>
              {UNIT_WORDS[units].area}
            </th>
            <th scope="col" className={styles.years}>
              Years
            </th>
            <th scope="col" className={styles.minima}>
              {INDEX_WORDS[index].heading}
              <span className={styles.ends}>
                <span>{span[0]}</span>
                <span>{span[1]}</span>
              </span>
            </th>
            <th scope="col" className={styles.change}>
              {words.heading}
            </th>
            {scale && (
              <th scope="col" className={styles.interval}>
                {words.intervalHeading}
                <IntervalAxis scale={scale} ticks={axisTicks(scale)} />
              </th>
            )}
            {sureness && (
              <>
                <th scope="col" className={styles.span}>
                  Rank span
                  <span className={styles.ends}>
                    <span>1</span>
                    <span>{all.length}</span>
                  </span>
                </th>
                <th scope="col" className={styles.among}>
                  Among the
                  <span className={styles.under}>{sureness.k === 1 ? 'steepest' : `${sureness.k} steepest`}</span>
                </th>
              </>
            )}
            <th scope="col" className={styles.steady}>
              Steadiness
            </th>
          </tr>
        </thead>
        <tbody>
          {before > 0 && <tr style={{ height: before }} />}
          {items.map(({ index: at }) => (
            <StationRow
              key={rows[at].code}
              row={rows[at]}
              at={at}
              index={index}
              href={stationHref(slug, rows[at].code, query)}
              selected={rows[at].code === selected}
              tabbable={at === tabbable}
              hover={hover}
              words={words}
              scale={scale}
              span={span}
              units={units}
              sureness={sureness}
              moved={movedOf?.(rows[at].code) ?? null}
              detectable={detectableOf(rows[at])}
            />
          ))}
          {after > 0 && <tr style={{ height: after }} />}
        </tbody>
      </table>
    </div>
  );
}

/** The station whose row holds an element. */
function codeUnder(target: EventTarget | null): string | null {
  if (!(target instanceof Element)) return null;
  return target.closest<HTMLElement>('tr[data-code]')?.dataset.code ?? null;
}
