'use client';
import 'leaflet/dist/leaflet.css';
import type L from 'leaflet';
import { memo, useEffect, useMemo, useState } from 'react';
import { createPortal } from 'react-dom';
import { AttributionControl, MapContainer, ScaleControl, TileLayer, useMap } from 'react-leaflet';
import type { Units } from '@/app/components/format';
import type { Needle } from '@/app/components/needle';
import type { AnnualIndexName } from '@/lib/basis';
import type { HoverStore } from '../hover-store.ts';
import type { MapRow } from '../map-row.ts';
import type { MapView } from '../map-state.ts';
import { outlineBox, stationBounds } from './bounds.ts';
import type { GroundLayer } from './ground-layer.ts';
import { MapControls } from './map-controls.tsx';
import { makePanes } from './panes.ts';
import { StationCallout } from './station-callout.tsx';
import styles from './station-map.module.css';
import { type GroundSource, useGround, useGroundSource } from './use-ground.ts';
import { useMapKeys } from './use-map-keys.ts';
import { useMapPointer } from './use-map-pointer.ts';
import { drawingOrder, useNeedleLayer } from './use-needle-layer.ts';
import { FIT, useOwnView } from './use-own-view.ts';

interface StationMapProps {
  regionName: string;
  slug: string;
  invented: boolean;
  rows: MapRow[];
  found: Set<string> | null;
  ground: GroundSource[];
  tiles: { url: string; attribution: string } | null;
  units: Units;
  /** what is compared */
  index: AnnualIndexName;
  hover: HoverStore;
  selected: string | null;
  onSelect: (code: string | null) => void;
  /** the view to begin with; null shows all stations */
  startView: MapView | null;
  /** a person moved the map; null when it shows all stations again */
  onView: (view: MapView | null) => void;
  /** codes of the stations inside the map's frame */
  onInView: (codes: Set<string>) => void;
  /** a station's mark, and what is said of its place beside it */
  markOf: (row: MapRow) => Needle;
  placeOf: (row: MapRow) => string;
}

const EVERYWHERE: L.LatLngBoundsExpression = [
  [-55, -170],
  [72, 170],
];

/** The map: ground, needles, and what happens on them. Loaded in the browser only; Leaflet wants a window. */
export const StationMap = memo(function StationMap(props: StationMapProps) {
  const { rows, startView, invented, tiles, units } = props;
  const bounds = useMemo(() => stationBounds(rows), [rows]);
  const start = startView
    ? { center: [startView.latitude, startView.longitude] as [number, number], zoom: startView.zoom }
    : { bounds: bounds ?? EVERYWHERE, boundsOptions: FIT };
  return (
    <MapContainer
      {...start}
      className={styles.map}
      keyboard={false}
      zoomControl={false}
      attributionControl={false}
      minZoom={2}
      maxZoom={17}
      zoomSnap={0.5}
      wheelPxPerZoomLevel={110}
    >
      {tiles && <TileLayer url={tiles.url} attribution={escapeHtml(tiles.attribution)} />}
      <AttributionControl prefix={false} position="bottomright" />
      {bounds && (
        <ScaleControl metric={units === 'metric'} imperial={units === 'us'} position="bottomright" maxWidth={110} />
      )}
      <MapInside {...props} bounds={bounds} outline={!invented && !tiles && bounds !== null} />
    </MapContainer>
  );
});

interface InsideProps extends StationMapProps {
  bounds: [[number, number], [number, number]] | null;
  outline: boolean;
}

function MapInside(props: InsideProps) {
  const {
    regionName,
    slug,
    units,
    index,
    rows,
    found,
    ground,
    hover,
    selected,
    onSelect,
    onView,
    onInView,
    bounds,
    outline,
  } = props;
  const { markOf, placeOf } = props;
  const map = useMap();
  useState(() => makePanes(map));
  const drawn = useMemo(() => drawingOrder(rows), [rows]);
  const layerOfGround = useGround(map);
  const layer = useNeedleLayer({ map, drawn, found, hover, selected, markOf });
  useMapPointer({ map, layer, drawn, hover, onSelect });
  useMapKeys({ map, layer, drawn, hover, selected, onSelect });
  useContainerWords(map, regionName, drawn.rows.length);
  const showAll = useOwnView(map, bounds, onView);

  useEffect(() => {
    const report = () => {
      const box = map.getBounds();
      onInView(new Set(drawn.rows.filter((row) => box.contains([row.latitude, row.longitude])).map((row) => row.code)));
    };
    report();
    map.on('moveend', report);
    return () => {
      map.off('moveend', report);
    };
  }, [map, drawn, onInView]);

  // a selection made elsewhere is brought into sight
  useEffect(() => {
    const row = selected === null ? undefined : drawn.rows[drawn.indexOf.get(selected) ?? -1];
    if (row && !map.getBounds().contains([row.latitude, row.longitude])) map.panTo([row.latitude, row.longitude]);
  }, [map, drawn, selected]);

  return (
    <>
      {outline && bounds && <Outline map={map} ground={layerOfGround} box={outlineBox(bounds)} />}
      {ground.map((source) => (
        <Ground key={source.url} ground={layerOfGround} source={source} />
      ))}
      {createPortal(
        <>
          <MapControls map={map} onShowAll={bounds ? showAll : null} />
          <StationCallout {...{ map, slug, drawn, hover, selected, units, index, markOf, placeOf }} />
        </>,
        beside(map),
      )}
    </>
  );
}

/** Controls stand beside Leaflet's own element and not in it: there every click on them would be the map's too. */
const beside = (map: L.Map): HTMLElement => map.getContainer().parentElement as HTMLElement;

function Ground({ ground, source }: { ground: GroundLayer; source: GroundSource }) {
  const failed = useGroundSource(ground, source);
  return failed ? (
    <p role="status" className={styles.failed}>
      The layer “{source.name}” could not be drawn.
    </p>
  ) : null;
}

const ATLAS = 'Outline: Natural Earth';

function Outline({ map, ground, box }: { map: L.Map; ground: GroundLayer; box: string }) {
  const source = useMemo<GroundSource>(
    () => ({ kind: 'outline', name: 'outline of land and borders', url: `/map-outline?box=${box}` }),
    [box],
  );
  useEffect(() => {
    map.getContainer().classList.add(styles.sea);
    map.attributionControl?.addAttribution(ATLAS);
    return () => {
      map.getContainer().classList.remove(styles.sea);
      map.attributionControl?.removeAttribution(ATLAS);
    };
  }, [map]);
  return <Ground ground={ground} source={source} />;
}

/** Tells screen readers what the map is and how it is used. */
function useContainerWords(map: L.Map, regionName: string, stations: number): void {
  useEffect(() => {
    const container = map.getContainer();
    container.tabIndex = 0;
    container.setAttribute('role', 'application');
    container.setAttribute(
      'aria-label',
      `Map of ${regionName} with ${stations} stations. Arrow keys go from station to station, with Shift they move the map; plus and minus zoom; Enter selects.`,
    );
  }, [map, regionName, stations]);
}

/** Leaflet writes attributions as HTML; a person's text stays text. */
const escapeHtml = (text: string): string => text.replace(/[&<>"']/g, (sign) => `&#${sign.charCodeAt(0)};`);
