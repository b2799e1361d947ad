import type { Corner } from '@/lib/region/in-polygon';
import { drawGround } from '../../_map/draw-ground.ts';
import { groundStyle } from '../../_map/ground-style.ts';
import type { Palette } from '../../_map/palette.ts';
import { type MapFrame, type Place, toPixels } from './map-frame.ts';
import type { GroundPart } from './use-ground-parts.ts';

const TURN = 2 * Math.PI;

/** What lies under the stations: land, catchments, rivers. */
export function drawUnder(
  context: CanvasRenderingContext2D,
  frame: MapFrame,
  parts: readonly GroundPart[],
  palette: Palette,
): void {
  const { scale, left, top, width, height } = frame;
  const view = { scale, left, top, box: [0, 0, width, height] as [number, number, number, number] };
  for (const { kind, shapes } of parts) {
    const steps = drawGround(context, shapes, view, (shape) => groundStyle(kind, palette, shape.properties));
    while (!steps.next().done);
  }
}

/** The stations, those in the group filled, and the group's edge. */
export function drawGroup(
  context: CanvasRenderingContext2D,
  frame: MapFrame,
  { stations, inside, area }: { stations: readonly Place[]; inside: readonly boolean[]; area: readonly Corner[] },
  palette: Palette,
): void {
  if (area.length > 0) {
    context.beginPath();
    for (const [i, [longitude, latitude]] of area.entries()) {
      const [x, y] = toPixels(frame, { longitude, latitude });
      if (i === 0) context.moveTo(x, y);
      else context.lineTo(x, y);
    }
    context.closePath();
    context.fillStyle = palette.blue;
    context.globalAlpha = 0.14;
    context.fill('evenodd');
    context.globalAlpha = 1;
    context.lineWidth = 2;
    context.strokeStyle = palette.blue;
    context.stroke();
  }
  const radius = stations.length > 400 ? 2.5 : 4.5;
  for (const [i, station] of stations.entries()) {
    const [x, y] = toPixels(frame, station);
    context.beginPath();
    context.arc(x, y, radius, 0, TURN);
    context.fillStyle = inside[i] ? palette.blue : palette.paper;
    context.fill();
    context.lineWidth = 1.4;
    context.strokeStyle = inside[i] ? palette.paper : palette.level;
    context.stroke();
  }
}
