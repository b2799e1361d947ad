'use client';
import { type FormEvent, useId, useMemo, useState } from 'react';
import { count, fixed } from '@/app/components/format';
import { apiHref } from '@/app/components/links';
import ui from '@/app/components/ui.module.css';
import { areaFromText, areaToText, type Corner, inPolygon } from '@/lib/region/in-polygon';
import { outlineBox } from '../../_map/bounds.ts';
import type { GroundSource } from '../../_map/use-ground.ts';
import type { EvidenceStation } from '../evidence-screen.tsx';
import styles from './group.module.css';
import { GroupMap } from './group-map.tsx';

interface Props {
  region: { slug: string; invented: boolean };
  layers: readonly { id: number; name: string; kind: GroundSource['kind'] }[];
  stations: readonly EvidenceStation[];
  /** the group in force, as the address has it */
  area: string | null;
  onUse(area: string | null): void;
}

type Placed = EvidenceStation & { longitude: number; latitude: number };
const isPlaced = (station: EvidenceStation): station is Placed =>
  station.longitude !== null && station.latitude !== null;

const cornersOf = (text: string | null): Corner[] => {
  const read = text === null ? null : areaFromText(text);
  return read && 'area' in read ? read.area : [];
};

/** Draws a group of stations on a map, or takes its corners as text, and puts it beside the groups of the table. */
export function DrawAGroup({ region, layers, stations, area, onUse }: Props) {
  const [draft, setDraft] = useState<Corner[]>(() => cornersOf(area));
  const [text, setText] = useState<string | null>(null);
  const problemId = useId();
  const placed = useMemo(() => stations.filter((station) => station.ranked).filter(isPlaced), [stations]);
  const inside = useMemo(
    () => placed.map((station) => draft.length >= 3 && inPolygon(draft, station)),
    [placed, draft],
  );
  const ground = useMemo(() => groundOf(region, layers, placed), [region, layers, placed]);
  const held = inside.filter(Boolean).length;
  const read = text === null ? null : areaFromText(text);
  const problem = read && 'problem' in read ? read.problem : null;

  if (placed.length === 0) return <p>No ranked station has coordinates, so no group can be drawn.</p>;
  const takeText = (event: FormEvent) => {
    event.preventDefault();
    if (!read || 'problem' in read) return;
    setDraft(read.area);
    setText(null);
  };

  return (
    <div className={styles.drawing}>
      <p>
        Click round the stations that belong together; drag a corner to move it. By keyboard, Enter on the map adds a
        corner, the arrow keys move it, Delete removes it.
      </p>
      <GroupMap stations={placed} inside={inside} area={draft} ground={ground} onArea={setDraft} />
      <p role="status">
        {draft.length < 3
          ? `${count(draft.length, 'corner')}: an area needs three.`
          : `${fixed(held)} of ${count(placed.length, 'ranked station')} ${held === 1 ? 'lies' : 'lie'} inside ${count(draft.length, 'corner')}.`}
      </p>
      <div className={styles.tools}>
        <button
          type="button"
          className={ui.primary}
          disabled={draft.length < 3 || held === 0}
          onClick={() => onUse(areaToText(draft))}
        >
          Test this group
        </button>
        <button type="button" className={ui.button} disabled={draft.length === 0} onClick={() => setDraft([])}>
          Start anew
        </button>
        {area !== null && (
          <button
            type="button"
            className={ui.button}
            onClick={() => {
              setDraft([]);
              onUse(null);
            }}
          >
            Take the group away
          </button>
        )}
      </div>
      <form onSubmit={takeText} className={styles.tools} aria-label="Corners as text">
        <label className={`${ui.label} ${styles.wide}`}>
          Corners as longitude,latitude;…
          <input
            className={ui.input}
            value={text ?? areaToText(draft)}
            aria-invalid={problem !== null || undefined}
            aria-describedby={problem === null ? undefined : problemId}
            onChange={(event) => setText(event.currentTarget.value)}
          />
        </label>
        <button type="submit" className={ui.button} disabled={text === null || problem !== null}>
          Draw it
        </button>
      </form>
      {problem !== null && text !== '' && (
        <p id={problemId} role="alert">
          This cannot be drawn: {problem}.
        </p>
      )}
      {!region.invented && <p className={styles.credit}>Outline: Natural Earth</p>}
    </div>
  );
}

/** Land and borders for a region of this world, then its own layers. */
function groundOf(
  { slug, invented }: Props['region'],
  layers: Props['layers'],
  placed: readonly Placed[],
): GroundSource[] {
  const longitudes = placed.map(({ longitude }) => longitude);
  const latitudes = placed.map(({ latitude }) => latitude);
  const box = outlineBox([
    [min(latitudes), min(longitudes)],
    [max(latitudes), max(longitudes)],
  ]);
  const outline: GroundSource[] =
    invented || placed.length === 0
      ? []
      : [{ kind: 'outline', name: 'land and borders', url: `/map-outline?box=${box}` }];
  const own = layers.map(({ id, name, kind }) => ({ kind, name, url: apiHref(slug, `layers/${id}`, '') }));
  return [...outline, ...own];
}

const min = (values: readonly number[]): number => values.reduce((least, value) => Math.min(least, value), Infinity);
const max = (values: readonly number[]): number => values.reduce((most, value) => Math.max(most, value), -Infinity);
