import type { GroundShape } from './ground-shapes.ts';
import type { GroundStyle } from './ground-style.ts';

/** From world pixels of zoom 0 to layer points: x · scale − left. */
interface GroundView {
  scale: number;
  left: number;
  top: number;
  /** edges of what is drawn, layer points: west, north, east, south */
  box: [number, number, number, number];
}

/** Points nearer to the one before than this are not drawn: a pixel cannot show them. */
const FINEST = 0.8;
/** Radius of a place that a layer gives as a point, pixels. */
const POINT_RADIUS = 2.5;
/** Points a step draws before it lets others work. */
const POINTS_A_STEP = 400;

/** Draws shapes one after another, pausing after every so many points. */
export function* drawGround(
  context: CanvasRenderingContext2D,
  shapes: readonly GroundShape[],
  view: GroundView,
  styleOf: (shape: GroundShape) => GroundStyle,
): Generator<void> {
  const [west, north, east, south] = view.box;
  context.lineJoin = 'round';
  context.lineCap = 'round';
  let points = 0;
  for (const shape of shapes) {
    const outside =
      shape.maxX * view.scale - view.left < west ||
      shape.minX * view.scale - view.left > east ||
      shape.maxY * view.scale - view.top < north ||
      shape.minY * view.scale - view.top > south;
    if (outside) continue;
    paint(context, shape, view, styleOf(shape));
    points += shape.xy.length / 2;
    if (points > POINTS_A_STEP) {
      points = 0;
      yield;
    }
  }
}

function paint(context: CanvasRenderingContext2D, shape: GroundShape, view: GroundView, style: GroundStyle): void {
  context.beginPath();
  if (shape.point) dots(context, shape, view);
  else for (let line = 1; line < shape.starts.length; line++) trace(context, shape, line, view);
  if (style.fill && shape.area) {
    context.globalAlpha = style.fillOpacity;
    context.fillStyle = style.fill;
    context.fill('evenodd');
    context.globalAlpha = 1;
  }
  if (style.stroke) {
    context.lineWidth = style.width;
    context.strokeStyle = style.stroke;
    context.stroke();
  }
}

function trace(context: CanvasRenderingContext2D, shape: GroundShape, line: number, view: GroundView): void {
  const { xy, starts } = shape;
  const [first, end] = [starts[line - 1], starts[line]];
  let [lastX, lastY] = [Number.NaN, Number.NaN];
  for (let at = first; at < end; at += 2) {
    const x = xy[at] * view.scale - view.left;
    const y = xy[at + 1] * view.scale - view.top;
    if (at === first) context.moveTo(x, y);
    else if (at < end - 2 && Math.abs(x - lastX) < FINEST && Math.abs(y - lastY) < FINEST) continue;
    else context.lineTo(x, y);
    lastX = x;
    lastY = y;
  }
  if (shape.area) context.closePath();
}

function dots(context: CanvasRenderingContext2D, { xy }: GroundShape, view: GroundView): void {
  for (let at = 0; at < xy.length; at += 2) {
    const x = xy[at] * view.scale - view.left;
    const y = xy[at + 1] * view.scale - view.top;
    context.moveTo(x + POINT_RADIUS, y);
    context.arc(x, y, POINT_RADIUS, 0, 2 * Math.PI);
  }
}
