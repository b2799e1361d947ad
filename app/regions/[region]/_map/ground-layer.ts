import type { GeoJsonObject } from 'geojson';
import L from 'leaflet';
import { CanvasFrame } from './canvas-frame.ts';
import { drawGround } from './draw-ground.ts';
import { type GroundShape, groundShapes } from './ground-shapes.ts';
import { type GroundKind, groundStyle } from './ground-style.ts';
import { inSlices } from './in-slices.ts';
import type { Palette } from './palette.ts';

/** Ground is costly to draw and rarely needs it: its canvas reaches far, and a drag inside it draws nothing. */
const OVERLAP = 0.5;

/** Rivers, catchments, outlines on one canvas. Leaflet's own GeoJSON layer draws every feature anew after each drag, which
 *  with the 2,000 catchments of a large region stops the map for a third of a second; here it is drawn in slices on a
 *  second canvas, which takes the first one's place when it is ready. */
export class GroundLayer extends L.Layer {
  private shapes: GroundShape[] = [];
  private canvas = newCanvas();
  private area = new CanvasFrame(OVERLAP);
  private map: L.Map | null = null;
  private giveUp: () => void = () => undefined;
  private drawing = false;

  constructor(
    private readonly data: GeoJsonObject,
    private readonly kind: GroundKind,
    private palette: Palette,
  ) {
    super();
  }

  override onAdd(map: L.Map): this {
    this.map = map;
    map.getPane(this.kind)?.append(this.canvas);
    const shapes: GroundShape[] = [];
    const read = function* (data: GeoJsonObject) {
      for (const shape of groundShapes(data)) {
        shapes.push(shape);
        yield;
      }
    };
    this.giveUp = inSlices(read(this.data), () => {
      this.shapes = shapes;
      this.draw();
    });
    return this;
  }

  override onRemove(): this {
    this.giveUp();
    this.canvas.remove();
    this.map = null;
    return this;
  }

  override getEvents(): { [name: string]: L.LeafletEventHandlerFn } {
    return {
      move: () => this.drawIfBeyond(),
      moveend: () => this.drawIfBeyond(),
      resize: () => this.draw(),
      zoomstart: () => this.stop(),
      zoomanim: (event) => this.map && this.area.follow(this.map, [this.canvas], event as L.ZoomAnimEvent),
      zoomend: () => this.drawAtNewZoom(),
      viewreset: () => this.drawAtNewZoom(),
    };
  }

  setPalette(palette: Palette): void {
    this.palette = palette;
    this.draw();
  }

  private stop(): void {
    if (!this.drawing) return;
    this.giveUp();
    this.drawing = false;
  }

  private drawIfBeyond(): void {
    if (this.map && !this.drawing && !this.area.holds(this.map)) this.draw();
  }

  private drawAtNewZoom(): void {
    if (!this.map) return;
    const [center, zoom] = [this.map.getCenter(), this.map.getZoom()];
    this.area.follow(this.map, [this.canvas], { center, zoom });
    this.draw();
  }

  private draw(): void {
    if (!this.map || this.shapes.length === 0) return;
    this.stop();
    const area = new CanvasFrame(OVERLAP).lay(this.map);
    const canvas = newCanvas();
    area.fit(canvas);
    const context = area.clear(canvas);
    if (!context) return;
    const origin = this.map.getPixelOrigin();
    const view = { scale: 2 ** this.map.getZoom(), left: origin.x, top: origin.y, box: area.box };
    const { kind, palette } = this;
    this.drawing = true;
    const steps = drawGround(context, this.shapes, view, (shape) => groundStyle(kind, palette, shape.properties));
    this.giveUp = inSlices(steps, () => {
      this.canvas.replaceWith(canvas);
      this.canvas = canvas;
      this.area = area;
      this.drawing = false;
    });
  }
}

function newCanvas(): HTMLCanvasElement {
  const canvas = document.createElement('canvas');
  canvas.className = 'leaflet-zoom-animated';
  canvas.setAttribute('aria-hidden', 'true');
  return canvas;
}
