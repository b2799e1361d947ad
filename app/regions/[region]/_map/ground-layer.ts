import type { GeoJsonObject } from 'geojson';
import L from 'leaflet';
import { CanvasFrame } from './canvas-frame.ts';
import { drawGround } from './draw-ground.ts';
import { type GroundShape, groundShapes } from './ground-shapes.ts';
import { type GroundKind, groundStyle } from './ground-style.ts';
import { inSlices } from './in-slices.ts';
import type { Palette } from './palette.ts';

/** Ground is costly to draw and rarely needs it: its canvas reaches far, and a drag inside it draws nothing. */
const OVERLAP = 0.4;

/** From the ground up. */
const ORDER: readonly GroundKind[] = ['outline', 'catchment', 'other', 'river'];

/** Rivers, catchments, outlines on one canvas. Leaflet's own GeoJSON layer draws every feature anew after each drag, which
 *  with the 2,000 catchments of a large region stops the map for a third of a second; here they are drawn in slices on a
 *  second canvas, which takes the first one's place when it is ready. */
export class GroundLayer extends L.Layer {
  private readonly sources = new Map<string, { kind: GroundKind; shapes: GroundShape[] }>();
  private canvas = newCanvas();
  private area = new CanvasFrame(OVERLAP);
  private map: L.Map | null = null;
  private readonly readings = new Map<string, () => void>();
  private giveUp: () => void = () => undefined;
  private drawing = false;

  constructor(private palette: Palette) {
    super();
  }

  override onAdd(map: L.Map): this {
    this.map = map;
    map.getPane('ground')?.append(this.canvas);
    this.draw();
    return this;
  }

  override onRemove(): this {
    for (const stopReading of this.readings.values()) stopReading();
    this.stop();
    this.canvas.remove();
    this.map = null;
    return this;
  }

  /** Adds a source; it is drawn when it has been read. */
  put(key: string, kind: GroundKind, data: GeoJsonObject): void {
    const shapes: GroundShape[] = [];
    const read = function* () {
      for (const shape of groundShapes(data)) {
        shapes.push(shape);
        yield;
      }
    };
    const stopReading = inSlices(read(), () => {
      this.readings.delete(key);
      this.sources.set(key, { kind, shapes });
      this.draw();
    });
    this.readings.set(key, stopReading);
  }

  drop(key: string): void {
    this.readings.get(key)?.();
    this.readings.delete(key);
    if (this.sources.delete(key)) this.draw();
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
    if (!this.map) return;
    this.stop();
    const area = new CanvasFrame(OVERLAP).lay(this.map);
    const canvas = newCanvas();
    area.fit(canvas);
    const context = area.clear(canvas, { willReadFrequently: true });
    if (!context) return;
    const origin = this.map.getPixelOrigin();
    const view = { scale: 2 ** this.map.getZoom(), left: origin.x, top: origin.y, box: area.box };
    const { palette } = this;
    const sources = [...this.sources.values()].sort((a, b) => ORDER.indexOf(a.kind) - ORDER.indexOf(b.kind));
    const steps = function* () {
      for (const { kind, shapes } of sources) {
        yield* drawGround(context, shapes, view, (shape) => groundStyle(kind, palette, shape.properties));
      }
    };
    this.drawing = true;
    const show = () => {
      this.canvas.replaceWith(canvas);
      this.canvas = canvas;
      this.area = area;
      this.drawing = false;
    };
    // a canvas puts its lines off until it is shown, and would then draw them all at once: reading one pixel draws now
    const drawNow = () => context.getImageData(0, 0, 1, 1);
    this.giveUp = inSlices(steps(), show, drawNow);
  }
}

function newCanvas(): HTMLCanvasElement {
  const canvas = document.createElement('canvas');
  canvas.className = 'leaflet-zoom-animated';
  canvas.setAttribute('aria-hidden', 'true');
  return canvas;
}
