'use client';
import dynamic from 'next/dynamic';
import { useQueryStates } from 'nuqs';
import { startTransition, useCallback, useMemo, useState } from 'react';
import type { Units } from '@/app/components/format';
import { apiHref } from '@/app/components/links';
import { needleOf, sharedNeedle } from '@/app/components/needle';
import { SplitPanes } from '@/app/components/split-panes';
import type { Basis } from '@/lib/basis';
import { filledShare } from './_certainty/certainty-view.ts';
import { placeWords } from './_certainty/place-words.ts';
import { useCertainty } from './_certainty/use-certainty.ts';
import { useMovement } from './_certainty/use-movement.ts';
import { Legend } from './_map/legend.tsx';
import type { GroundSource } from './_map/use-ground.ts';
import { RankingPanel } from './_ranking/ranking-panel.tsx';
import { createHoverStore } from './hover-store.ts';
import type { MapRow } from './map-row.ts';
import styles from './map-screen.module.css';
import { type Fill, type MapView, mapState, type Tab, USUAL_SPLIT } from './map-state.ts';
import { hasPlace, matcher } from './row-filter.ts';
import { SmallScreen } from './small-screen.tsx';
import { useIsNarrow } from './use-is-narrow.ts';

/** Leaflet wants a window as soon as it is imported, so the map is only ever loaded in the browser. */
const StationMap = dynamic(() => import('./_map/station-map.tsx').then((part) => part.StationMap), {
  ssr: false,
  loading: () => <p className={styles.waiting}>Drawing the map…</p>,
});

interface MapScreenProps {
  region: {
    slug: string;
    name: string;
    invented: boolean;
    tileUrl: string | null;
    tileAttribution: string | null;
  };
  rows: MapRow[];
  layers: { id: number; name: string; kind: string }[];
  /** the basis in force, as URL text: what differs from the region's own */
  terms: string;
  rankBy: Basis['rankBy'];
  index: Basis['index'];
  units: Units;
  span: [number, number];
}

/** Map and ranking, linked both ways. What is shown stands in the address: view, selection, following, list, search. */
export function MapScreen({ region, rows, layers, terms, rankBy, index, units, span }: MapScreenProps) {
  const [state, setState] = useQueryStates(mapState, { history: 'replace', throttleMs: 150 });
  const [inView, setInView] = useState<Set<string> | null>(null);
  const [hover] = useState(createHoverStore);
  const narrow = useIsNarrow();
  // the map keeps its own view from here on, and tells; it is not told
  const [startView] = useState(state.view);

  const found = useMemo(() => {
    if (!state.q.trim()) return null;
    const matches = matcher(state.q);
    return new Set(rows.filter(matches).map((row) => row.code));
  }, [rows, state.q]);

  const select = useCallback((station: string | null) => void setState({ station }), [setState]);
  const setFollow = useCallback((follow: boolean) => void setState({ follow }), [setState]);
  const setSearch = useCallback((q: string) => void setState({ q }), [setState]);
  const setK = useCallback((k: number) => void setState({ k }), [setState]);
  const setFill = useCallback((fill: Fill) => void setState({ fill }), [setState]);
  const setTab = useCallback((tab: Tab) => void setState({ tab }), [setState]);
  const showView = useCallback((view: MapView | null) => void setState({ view }), [setState]);

  // the lists follow in slices of a few milliseconds: the map never waits for them
  const showInView = useCallback((codes: Set<string>) => startTransition(() => setInView(codes)), []);

  const tested = useMemo(() => rows.filter(({ rank, drying }) => rank !== null || drying).length, [rows]);
  const certainty = useCertainty(region.slug, terms, tested);
  const movement = useMovement(region.slug, terms).value;
  const { k, fill } = state;
  const { view } = certainty;
  const markOf = useCallback(
    (row: MapRow) => {
      const needle = needleOf(row);
      return view && fill !== 'significance' ? sharedNeedle(needle, filledShare(view, row.code, fill, k)) : needle;
    },
    [view, fill, k],
  );
  const placeOf = useCallback((row: MapRow) => placeWords(view, row, k, { index, units }), [view, k, index, units]);

  const ground = useMemo<GroundSource[]>(
    () =>
      layers.map(({ id, name, kind }) => ({
        kind: kind === 'river' || kind === 'catchment' ? kind : 'other',
        name,
        url: apiHref(region.slug, `layers/${id}`, ''),
      })),
    [layers, region.slug],
  );

  const { tileUrl, tileAttribution } = region;
  const tiles = useMemo(
    () => (tileUrl ? { url: tileUrl, attribution: tileAttribution ?? '' } : null),
    [tileUrl, tileAttribution],
  );

  const hasPlaces = useMemo(() => rows.some(hasPlace), [rows]);
  const map = (
    <section aria-label="Map" className={styles.mapColumn}>
      <div className={styles.mapBox}>
        <StationMap
          regionName={region.name}
          slug={region.slug}
          invented={region.invented}
          rows={rows}
          found={found}
          ground={ground}
          tiles={tiles}
          units={units}
          index={index}
          hover={hover}
          selected={state.station}
          onSelect={select}
          startView={startView}
          onView={showView}
          onInView={showInView}
          markOf={markOf}
          placeOf={placeOf}
        />
        {!hasPlaces && (
          <p className={styles.noPlaces}>
            No station has coordinates, so the map has nothing to show. The ranking works without; a registry with
            latitude and longitude puts the stations here.
          </p>
        )}
      </div>
      {hasPlaces && (
        <Legend
          key={narrow ? 'narrow' : 'wide'}
          rows={rows}
          startOpen={!narrow}
          fill={fill}
          isKnown={view !== null}
          onFill={setFill}
          k={k}
          index={index}
        />
      )}
    </section>
  );

  const ranking = (
    <RankingPanel
      slug={region.slug}
      regionName={region.name}
      rows={rows}
      found={found}
      inView={inView}
      follow={state.follow}
      onFollow={setFollow}
      search={state.q}
      onSearch={setSearch}
      tab={state.tab}
      onTab={setTab}
      rankBy={rankBy}
      index={index}
      units={units}
      span={span}
      hover={hover}
      selected={state.station}
      onSelect={select}
      certainty={certainty}
      k={k}
      onK={setK}
      movement={movement}
    />
  );

  if (narrow) return <SmallScreen map={map} ranking={ranking} />;
  return (
    <SplitPanes
      label="Divider between map and ranking"
      share={state.split}
      onShare={(split) => void setState({ split })}
      limits={[20, 75]}
      usual={USUAL_SPLIT}
      first={map}
      second={ranking}
    />
  );
}
