import type L from 'leaflet';
import Link from 'next/link';
import { useSearchParams } from 'next/navigation';
import { useEffect, useReducer, useRef } from 'react';
import { area, interval, pValue, signed, type Units } from '@/app/components/format';
import { stationHref } from '@/app/components/links';
import { type Needle, needleOf, needleWords } from '@/app/components/needle';
import { NeedleMark } from '@/app/components/needle-mark';
import type { AnnualIndexName } from '@/lib/basis';
import { INDEX_FACTS } from '@/lib/region/index-facts';
import { INDEX_WORDS } from '@/lib/region/index-words';
import { type HoverStore, useHovered } from '../hover-store.ts';
import type { MapRow } from '../map-row.ts';
import styles from './station-map.module.css';
import type { DrawnStations } from './use-needle-layer.ts';

interface StationCalloutProps {
  map: L.Map;
  slug: string;
  drawn: DrawnStations;
  hover: HoverStore;
  selected: string | null;
  units: Units;
  /** what is compared */
  index: AnnualIndexName;
  markOf: (row: MapRow) => Needle;
  /** how sure its place is, in words; empty while that is not known */
  placeOf: (row: MapRow) => string;
}

/** Words beside the mark that is pointed at or chosen, and the same for screen readers. */
export function StationCallout(props: StationCalloutProps) {
  const { map, slug, drawn, hover, selected, units, index, markOf, placeOf } = props;
  const hovered = useHovered(hover);
  const query = useSearchParams().toString();
  const card = useRef<HTMLDivElement>(null);
  const [, redraw] = useReducer((n: number) => n + 1, 0);
  const code = hovered ?? selected;
  const row = code === null ? undefined : drawn.rows[drawn.indexOf.get(code) ?? -1];

  // the card stays at its mark while the map moves, without rendering
  useEffect(() => {
    const place = () => {
      const element = card.current;
      if (!element || !row) return;
      const size = map.getSize();
      const at = map.latLngToContainerPoint([row.latitude, row.longitude]);
      const left = at.x > size.x - element.offsetWidth - 28;
      const x = left ? at.x - element.offsetWidth - 20 : at.x + 20;
      const y = Math.max(8, Math.min(size.y - element.offsetHeight - 8, at.y - element.offsetHeight / 2));
      element.style.transform = `translate(${Math.round(Math.max(8, x))}px, ${Math.round(y)}px)`;
      element.style.visibility = at.x < -10 || at.y < -10 || at.x > size.x + 10 || at.y > size.y + 10 ? 'hidden' : '';
    };
    place();
    map.on('move zoom resize', place);
    map.on('moveend', redraw);
    return () => {
      map.off('move zoom resize', place);
      map.off('moveend', redraw);
    };
  }, [map, row]);

  const words = row ? calloutWords(row, index) : '';
  const place = row ? placeOf(row) : '';
  return (
    <>
      <p aria-live="polite" className="visually-hidden">
        {row ? [row.name, words, place, row.note].filter(Boolean).join(', ') : ''}
      </p>
      {row && (
        <div ref={card} className={styles.card} data-hovering={hovered !== null && hovered !== selected}>
          <p className={styles.cardName}>
            <NeedleMark needle={markOf(row)} size={22} />
            <strong>{row.name}</strong>
          </p>
          <p className={styles.cardFacts}>
            {[row.river, row.areaKm2 === null ? 'no drainage area' : area(row.areaKm2, units)]
              .filter(Boolean)
              .join(' · ')}
          </p>
          <p>{words}</p>
          {place && <p>{place}</p>}
          {row.note && <p className={styles.cardFacts}>{row.note}</p>}
          {code === selected && (
            <Link href={stationHref(slug, row.code, query)} prefetch={false}>
              Open the station’s page
            </Link>
          )}
        </div>
      )}
    </>
  );
}

/** Example: "rank 3: −9.3 % per decade (−12.1 to −6.4), adjusted p 0.003; falling, significant" */
function calloutWords(row: MapRow, index: AnnualIndexName): string {
  if (row.drying) {
    const { value, low, high } = row.figure;
    const sure = needleOf(row).significant ? 'significant' : 'may be chance';
    return `drying: ${signed(value)} days without flow per decade (${interval(low, high)}), adjusted p ${pValue(row.pAdjusted)}; ${sure}`;
  }
  if (row.rank === null) return `not ranked: ${row.unrankedReason ?? 'no reason given'}`;
  return `rank ${row.rank}: ${changeWords(row, index)}, adjusted p ${pValue(row.pAdjusted)}; ${needleWords(needleOf(row), index)}`;
}

function changeWords(row: MapRow, index: AnnualIndexName): string {
  const { change } = row;
  if (change === null) return `no percentage, its ${INDEX_WORDS[index].mean} is not above 0`;
  const unit = INDEX_FACTS[index].hasPercent ? '%' : 'days';
  return `${signed(change.value)} ${unit} per decade (${interval(change.low, change.high)})`;
}
