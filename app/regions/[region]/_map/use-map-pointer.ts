import type L from 'leaflet';
import { useEffect } from 'react';
import type { HoverStore } from '../hover-store.ts';
import type { NeedleLayer } from './needle-layer.ts';
import type { DrawnStations } from './use-needle-layer.ts';

interface MapPointer {
  map: L.Map;
  layer: NeedleLayer;
  drawn: DrawnStations;
  hover: HoverStore;
  onSelect: (code: string | null) => void;
}

/** Pointing hovers, a click selects, a click on open ground clears the selection. */
export function useMapPointer({ map, layer, drawn, hover, onSelect }: MapPointer): void {
  useEffect(() => {
    const container = map.getContainer();
    const codeAt = (event: L.LeafletMouseEvent) => drawn.rows[layer.hit(event.containerPoint)]?.code ?? null;
    let dragging = false;
    const dragStart = () => {
      dragging = true;
      hover.set(null);
    };
    const dragEnd = () => {
      dragging = false;
    };
    const move = (event: L.LeafletMouseEvent) => {
      if (dragging) return;
      const code = codeAt(event);
      container.style.cursor = code === null ? '' : 'pointer';
      hover.set(code);
    };
    const leave = () => hover.set(null);
    const click = (event: L.LeafletMouseEvent) => onSelect(codeAt(event));
    map.on('mousemove', move);
    map.on('dragstart', dragStart);
    map.on('dragend', dragEnd);
    map.on('mouseout', leave);
    map.on('click', click);
    return () => {
      map.off('mousemove', move);
      map.off('dragstart', dragStart);
      map.off('dragend', dragEnd);
      map.off('mouseout', leave);
      map.off('click', click);
    };
  }, [map, layer, drawn, hover, onSelect]);
}
