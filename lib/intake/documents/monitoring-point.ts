import { KM2_OF, KM2_OF_M2 } from '../../series/area-units.ts';
import type { FoundFacts } from '../types.ts';
import { type Attributes, attribute } from './xml-events.ts';

/** UCUM codes and common words for units of area, and km² in one. */
const AREA_UNITS: Record<string, number> = {
  km2: KM2_OF['km²'],
  'km²': KM2_OF['km²'],
  sqkm: KM2_OF['km²'],
  ha: KM2_OF.ha,
  har: KM2_OF.ha,
  m2: KM2_OF_M2,
  mi2: KM2_OF['mi²'],
  '[mi_i]2': KM2_OF['mi²'],
  '[smi_us]': KM2_OF['mi²'],
};
const AREA = /catchment area|drainage area|basin area|watershed area/i;
/** Geographic systems whose difference from WGS 84 is less than the width of a gauge's neighbourhood on a map. */
const GEOGRAPHIC = /^(?:4326|4258|4269|4283|7844|4167|4148|4674)$/;

/** A station as a document of WaterML 2.0 describes it (MonitoringPoint), gathered element by element. */
export class MonitoringPoint {
  readonly id: string;
  identifier = '';
  name = '';
  reference = '';
  referenceTitle = '';
  private sampled = '';
  private area: number | null = null;
  private latitude: number | null = null;
  private longitude: number | null = null;
  /** what was not taken as written */
  warning: string | null = null;
  private srs = '';
  private parameter = '';
  private areaUnit = '';

  constructor(attributes: Attributes) {
    this.id = attribute(attributes, 'id');
  }

  open(name: string, attributes: Attributes): void {
    if (name === 'sampledFeature') this.sampled = attribute(attributes, 'title');
    else if (name === 'descriptionReference') {
      this.reference = attribute(attributes, 'href');
      this.referenceTitle = attribute(attributes, 'title');
    } else if (name === 'Point' || name === 'pos') this.srs = attribute(attributes, 'srsName') || this.srs;
    else if (name === 'name') this.parameter = attribute(attributes, 'title');
    else if (name === 'value' || name === 'uom') {
      this.areaUnit = attribute(attributes, name === 'value' ? 'uom' : 'code') || this.areaUnit;
    }
  }

  /** @param parent  name of the element around it */
  close(name: string, text: string, parent: string): void {
    const content = text.trim();
    if (name === 'identifier') this.identifier ||= content;
    else if (name === 'name' && parent !== 'NamedValue') this.name ||= content;
    else if (name === 'name') this.parameter ||= content;
    else if (name === 'pos') this.place(content);
    else if (name === 'value' && AREA.test(this.parameter) && content !== '') {
      const factor = AREA_UNITS[this.areaUnit];
      if (factor !== undefined && Number(content) > 0) this.area = Number(content) * factor;
    } else if (name === 'NamedValue') this.areaUnit = '';
  }

  /** In what order the two numbers stand, the name of their system says: its full name (urn or address) latitude first;
   *  the short “EPSG:4326” longitude first, as those write who use it; CRS84 longitude first. What cannot be is turned
   *  round. Source: OGC 05-096r1 (GML 3.1.1), OGC Axis Order Policy. */
  private place(text: string): void {
    const [first, second] = text.split(/\s+/).map(Number);
    if (!(Math.abs(first) <= 180) || !(Math.abs(second) <= 180)) {
      if (!(Math.abs(first) <= 360 && Math.abs(second) <= 360)) return;
    }
    const isCrs84 = /CRS:?84$/i.test(this.srs);
    const code = /(\d+)$/.exec(this.srs)?.[1] ?? '';
    if (this.srs !== '' && !isCrs84 && !GEOGRAPHIC.test(code)) {
      this.warning = `Positions in the system “${this.srs}” were left out: only longitude and latitude are read.`;
      return;
    }
    const short = /^EPSG:\d+$/i.test(this.srs);
    let longitudeFirst = isCrs84 || short;
    if (short) {
      this.warning = `Positions in “${this.srs}” were taken as longitude, latitude; some write them the other way: look at the map.`;
    }
    const latitude = longitudeFirst ? second : first;
    const other = longitudeFirst ? first : second;
    if (Math.abs(latitude) > 90 && Math.abs(other) <= 90) {
      longitudeFirst = !longitudeFirst;
      this.warning = `Positions in “${this.srs}” stand the other way round than their system says; they were turned.`;
    }
    this.latitude = longitudeFirst ? second : first;
    this.longitude = longitudeFirst ? first : second;
    if (Math.abs(this.latitude) > 90) {
      this.latitude = null;
      this.longitude = null;
    }
  }

  /** @param title  the feature's title where the observation refers to it */
  facts(title: string): Omit<FoundFacts, 'code'> {
    const name = this.name || this.referenceTitle || title;
    return {
      ...(name === '' ? {} : { name }),
      ...(this.sampled === '' || this.sampled === name ? {} : { river: this.sampled }),
      ...(this.latitude === null || this.longitude === null
        ? {}
        : { latitude: this.latitude, longitude: this.longitude }),
      ...(this.area === null ? {} : { areaKm2: this.area }),
    };
  }
}

/** By what a station may be known, the surest first: its identifier, the site that its description or its address names,
 *  its name, and last the id that only the document uses. */
export function stationNames(point: MonitoringPoint | null, feature: { href: string; title: string }): string[] {
  const inAddress = /[?&]sites?=([^&]+)/.exec(point?.reference ?? '')?.[1] ?? '';
  const address = feature.href.startsWith('#') ? '' : lastPart(feature.href);
  const named = [point?.identifier, inAddress, address, point?.name, point?.referenceTitle, feature.title];
  const names = [...named, point?.id, feature.href.replace(/^#/, '')];
  return [...new Set(names.filter((name): name is string => Boolean(name)))];
}

/** Last part of an address: behind its last slash, colon or hash. */
export function lastPart(href: string): string {
  return href.split(/[/#:]/).filter(Boolean).at(-1) ?? '';
}
