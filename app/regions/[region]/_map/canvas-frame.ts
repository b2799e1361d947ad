import L from 'leaflet';

/** A stretch of the map, wider than its box, that a canvas shows: where it lies, and how the picture follows while the
 *  map is dragged and zoomed. Layer points are Leaflet's: they stand still under a drag and are counted anew at each zoom. */
export class CanvasFrame {
  /** layer point of the upper left corner */
  origin = L.point(0, 0);
  size = L.point(0, 0);
  private centre = L.latLng(0, 0);
  private zoom = 0;

  /** @param overlap how far the frame reaches past each edge of the map's box, as a share of its size */
  constructor(private readonly overlap: number) {}

  /** Lays the frame about the view as it is now. */
  lay(map: L.Map): this {
    const size = map.getSize();
    this.origin = map.containerPointToLayerPoint(size.multiplyBy(-this.overlap)).round();
    this.size = size.multiplyBy(1 + 2 * this.overlap).round();
    this.centre = map.getCenter();
    this.zoom = map.getZoom();
    return this;
  }

  /** Whether the view still lies inside the frame. */
  holds(map: L.Map): boolean {
    const near = map.containerPointToLayerPoint([0, 0]).subtract(this.origin);
    const far = near.add(map.getSize());
    return map.getZoom() === this.zoom && near.x >= 0 && near.y >= 0 && far.x <= this.size.x && far.y <= this.size.y;
  }

  /** West, north, east and south edge in layer points. */
  get box(): [number, number, number, number] {
    return [this.origin.x, this.origin.y, this.origin.x + this.size.x, this.origin.y + this.size.y];
  }

  /** Gives a canvas the frame's size and place. */
  fit(canvas: HTMLCanvasElement): void {
    const [width, height] = [Math.round(this.size.x * pixelRatio()), Math.round(this.size.y * pixelRatio())];
    if (canvas.width !== width || canvas.height !== height) {
      canvas.width = width;
      canvas.height = height;
      canvas.style.width = `${this.size.x}px`;
      canvas.style.height = `${this.size.y}px`;
    }
    L.DomUtil.setTransform(canvas, this.origin, 1);
  }

  /** A cleared canvas whose unit is a layer pixel. */
  clear(canvas: HTMLCanvasElement, settings?: CanvasRenderingContext2DSettings): CanvasRenderingContext2D | null {
    const context = canvas.getContext('2d', settings);
    if (!context) return null;
    const ratio = pixelRatio();
    context.setTransform(1, 0, 0, 1, 0, 0);
    context.clearRect(0, 0, canvas.width, canvas.height);
    context.setTransform(ratio, 0, 0, ratio, -this.origin.x * ratio, -this.origin.y * ratio);
    return context;
  }

  /** Scales the drawn picture to where it lies in another view, until it is drawn anew. */
  follow(map: L.Map, canvases: HTMLCanvasElement[], { center, zoom }: { center: L.LatLng; zoom: number }): void {
    const scale = map.getZoomScale(zoom, this.zoom);
    const half = map.getSize().multiplyBy(0.5 + this.overlap);
    const offset = half
      .multiplyBy(-scale)
      .add(map.project(this.centre, zoom))
      .subtract(originAt(map, center, zoom));
    for (const canvas of canvases) L.DomUtil.setTransform(canvas, offset, scale);
  }
}

/** World pixel of layer point 0,0 once the map stands at this centre and zoom. */
function originAt(map: L.Map, center: L.LatLng, zoom: number): L.Point {
  const pane = L.DomUtil.getPosition(map.getPanes().mapPane) ?? L.point(0, 0);
  return map.project(center, zoom).subtract(map.getSize().divideBy(2)).add(pane).round();
}

export const pixelRatio = (): number => window.devicePixelRatio || 1;
