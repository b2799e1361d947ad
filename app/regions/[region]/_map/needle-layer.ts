import L from 'leaflet';
import type { Needle } from '@/app/components/needle';
import { CanvasFrame, pixelRatio } from './canvas-frame.ts';
import { drawNeedle } from './draw-needle.ts';
import { indexMarks, type MarkIndex } from './mark-index.ts';
import { NeedleSprites } from './needle-sprites.ts';
import type { Palette } from './palette.ts';

export interface Place {
  latitude: number;
  longitude: number;
}

/** How far the canvas reaches past each edge of the map, as a share of its size: dragging within it draws nothing. */
const OVERLAP = 0.3;
/** Extra pixels about a disc that still count as on it: fingers and small discs. */
const REACH = 8;

/** All needles on one canvas. They are given in drawing order; the emphasised ones are drawn on a second canvas above,
 *  so that hovering draws one mark and not two thousand. */
export class NeedleLayer extends L.Layer {
  private readonly base = document.createElement('canvas');
  private readonly top = document.createElement('canvas');
  private stations: readonly Place[] = [];
  private needles: readonly Needle[] = [];
  private faded: Uint8Array = new Uint8Array(0);
  private xs = new Float64Array(0);
  private ys = new Float64Array(0);
  private index: MarkIndex = indexMarks(this.xs, this.ys);
  private hovered = -1;
  private selected = -1;
  private readonly sprites = new NeedleSprites();
  private frame = 0;
  private drawnRadius = 0;
  private readonly area = new CanvasFrame(OVERLAP);
  private map: L.Map | null = null;

  constructor(private palette: Palette) {
    super();
    for (const canvas of [this.base, this.top]) {
      canvas.className = 'leaflet-zoom-animated';
      canvas.style.pointerEvents = 'none';
      canvas.setAttribute('aria-hidden', 'true');
    }
  }

  override onAdd(map: L.Map): this {
    this.map = map;
    map.getPane('needles')?.append(this.base, this.top);
    this.project();
    this.draw();
    return this;
  }

  override onRemove(): this {
    cancelAnimationFrame(this.frame);
    this.base.remove();
    this.top.remove();
    this.map = null;
    return this;
  }

  override getEvents(): { [name: string]: L.LeafletEventHandlerFn } {
    return {
      move: () => this.drawIfBeyond(),
      moveend: () => this.drawIfOutdated(),
      resize: () => this.draw(),
      zoomend: () => this.project(),
      viewreset: () => this.project(),
      zoomanim: (event) => this.map && this.area.follow(this.map, [this.base, this.top], event as L.ZoomAnimEvent),
    };
  }

  /** Other stations. Their needles must follow (setNeedles): only then they are drawn. */
  setPlaces(places: readonly Place[]): void {
    this.stations = places;
    this.needles = [];
    this.faded = new Uint8Array(places.length);
    this.hovered = -1;
    this.selected = -1;
    this.project();
  }

  /** What stands at the places, one for each. */
  setNeedles(needles: readonly Needle[]): void {
    this.needles = needles;
    this.draw();
  }

  setPalette(palette: Palette): void {
    this.palette = palette;
    this.draw();
  }

  /** Marks with a 1 step back: they are not what is searched for. */
  setFaded(faded: Uint8Array): void {
    this.faded = faded;
    this.draw();
  }

  setEmphasis(hovered: number, selected: number): void {
    if (hovered === this.hovered && selected === this.selected) return;
    this.hovered = hovered;
    this.selected = selected;
    this.drawTop();
  }

  /** The mark under a point of the map's box, or −1. */
  hit(point: L.Point): number {
    if (!this.map) return -1;
    const at = this.map.containerPointToLayerPoint(point);
    return this.index.at(at.x, at.y, this.radius() + REACH);
  }

  /** Places of all marks in layer points, in drawing order. */
  get places(): { xs: Float64Array; ys: Float64Array } {
    return { xs: this.xs, ys: this.ys };
  }

  /** Discs shrink where many share the view, so that the whole of a large region can still be read. */
  private radius(): number {
    if (!this.map) return 0;
    const size = this.map.getSize();
    const near = this.map.containerPointToLayerPoint([0, 0]);
    const inView = this.index.inside(near.x, near.y, near.x + size.x, near.y + size.y).length;
    const room = Math.sqrt((size.x * size.y) / Math.max(1, inView)) * 0.085;
    // in steps, so that a small pan keeps the size and the pictures made for it
    return Math.max(3, Math.min(7, Math.round(room * 2) / 2));
  }

  private project(): void {
    if (!this.map) return;
    this.xs = new Float64Array(this.stations.length);
    this.ys = new Float64Array(this.stations.length);
    for (let i = 0; i < this.stations.length; i++) {
      const point = this.map.latLngToLayerPoint([this.stations[i].latitude, this.stations[i].longitude]);
      this.xs[i] = point.x;
      this.ys[i] = point.y;
    }
    this.index = indexMarks(this.xs, this.ys);
  }

  private drawIfBeyond(): void {
    if (!this.map || this.frame || this.area.holds(this.map)) return;
    this.frame = requestAnimationFrame(() => {
      this.frame = 0;
      this.draw();
    });
  }

  /** After a small drag the picture still serves, unless the discs should have another size. */
  private drawIfOutdated(): void {
    if (this.map && (!this.area.holds(this.map) || this.radius() !== this.drawnRadius)) this.draw();
  }

  private draw(): void {
    if (!this.map) return;
    this.area.lay(this.map);
    for (const canvas of [this.base, this.top]) this.area.fit(canvas);
    const context = this.area.clear(this.base);
    if (!context) return;
    this.drawnRadius = this.radius();
    this.sprites.use(this.drawnRadius, pixelRatio(), this.palette);
    for (const i of this.index.inside(...this.area.box).sort((a, b) => a - b)) {
      context.globalAlpha = this.faded[i] ? 0.18 : 1;
      if (this.needles[i]) this.sprites.draw(context, this.needles[i], this.xs[i], this.ys[i]);
    }
    this.drawTop();
  }

  private drawTop(): void {
    const context = this.area.clear(this.top);
    if (!context) return;
    const radius = this.drawnRadius;
    for (const i of new Set([this.selected, this.hovered])) {
      if (i < 0 || i >= this.needles.length) continue;
      const place = { x: this.xs[i], y: this.ys[i] };
      const chosen = i === this.selected;
      context.beginPath();
      context.arc(place.x, place.y, Math.max(radius, 6) * 2.4, 0, 2 * Math.PI);
      context.fillStyle = this.palette.paper;
      context.globalAlpha = 0.75;
      context.fill();
      context.globalAlpha = 1;
      context.lineWidth = chosen ? 2.5 : 1.5;
      context.strokeStyle = this.palette.blue;
      context.stroke();
      drawNeedle(context, this.needles[i], place, Math.max(radius * 1.1, 6), this.palette);
    }
  }
}
