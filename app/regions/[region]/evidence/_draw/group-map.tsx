'use client';
import { useCallback, useMemo, useState } from 'react';
import { useCanvas } from '@/app/components/canvas/use-canvas';
import { useTokens } from '@/app/components/canvas/use-tokens';
import { useWidth } from '@/app/components/use-width';
import type { Corner } from '@/lib/region/in-polygon';
import { MAP_TOKENS } from '../../_map/palette.ts';
import type { GroundSource } from '../../_map/use-ground.ts';
import { CornerHandles } from './corner-handles.tsx';
import { drawGroup, drawUnder } from './draw-group.ts';
import { withCorner } from './edit-area.ts';
import styles from './group.module.css';
import { frameMap, type Place, toCorner } from './map-frame.ts';
import { useGroundParts } from './use-ground-parts.ts';

interface Props {
  stations: readonly Place[];
  /** by station: whether the area holds it */
  inside: readonly boolean[];
  area: readonly Corner[];
  ground: readonly GroundSource[];
  onArea(area: Corner[]): void;
}

/** A small map of the stations on which a group is drawn corner by corner: a click, a tap or Enter adds one, and each can be
 *  dragged or moved with the arrow keys. */
export function GroupMap({ stations, inside, area, ground, onArea }: Props) {
  const [box, width] = useWidth<HTMLDivElement>(720);
  const frame = useMemo(() => frameMap(stations, width), [stations, width]);
  const palette = useTokens(MAP_TOKENS);
  const { parts, failed } = useGroundParts(ground);
  const [focus, setFocus] = useState<number | null>(null);
  const under = useCallback(
    (context: CanvasRenderingContext2D) => {
      if (frame && palette) drawUnder(context, frame, parts, palette);
    },
    [frame, palette, parts],
  );
  const over = useCallback(
    (context: CanvasRenderingContext2D) => {
      if (frame && palette) drawGroup(context, frame, { stations, inside, area }, palette);
    },
    [frame, palette, stations, inside, area],
  );
  const size = [frame?.width ?? 1, frame?.height ?? 1] as const;
  const { canvas: land } = useCanvas(...size, under);
  const { canvas: marks } = useCanvas(...size, over);
  if (!frame) return null;

  const add = (x: number, y: number, byKey: boolean) => {
    const next = withCorner(area, toCorner(frame, x, y));
    onArea(next.area);
    if (byKey) setFocus(next.at);
  };

  return (
    <div ref={box} className={styles.map} style={{ blockSize: frame.height }}>
      <button
        type="button"
        className={styles.surface}
        aria-label={`Map of the stations. A click adds a corner there, Enter one in the middle. ${area.length} corners so far.`}
        onClick={(event) => {
          const { left, top } = event.currentTarget.getBoundingClientRect();
          // a click by keyboard has no place
          if (event.detail === 0) add(frame.width / 2, frame.height / 2, true);
          else add(event.clientX - left, event.clientY - top, false);
        }}
      >
        <canvas ref={land} style={{ inlineSize: frame.width, blockSize: frame.height }} />
        <canvas ref={marks} style={{ inlineSize: frame.width, blockSize: frame.height }} />
      </button>
      <CornerHandles frame={frame} area={area} focus={focus} onFocused={() => setFocus(null)} onArea={onArea} />
      {failed.length > 0 && (
        <p role="status" className={styles.failed}>
          Not drawn: {failed.join(', ')}
        </p>
      )}
    </div>
  );
}
