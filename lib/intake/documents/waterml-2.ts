import type { DocumentParser } from './document-reader.ts';
import { extremeOf, meaningOf } from './interpolation.ts';
import { lastPart, MonitoringPoint, stationNames } from './monitoring-point.ts';
import { statisticNamed } from './observed-quantity.ts';
import { Qualifier, sentenceBits } from './qualifier.ts';
import type { SeriesHead } from './series-head.ts';
import type { Point, SeriesSink } from './series-sink.ts';
import { durationDays, spacedTime } from './time-stamp.ts';
import { type Attributes, attribute, type ElementHandler, readXml } from './xml-events.ts';

/** More stations than any region has. */
const MOST_FEATURES = 100_000;
const FEATURES = new Set(['MonitoringPoint', 'SF_SpatialSamplingFeature', 'SF_SamplingFeature']);

/** How values were made, which the observation, its process and the series each may say. */
interface Making {
  interpolation: string;
  unit: string;
  aggregation: string;
}

/** Reads WaterML 2.0 (OGC 10-126r4): observations in a collection, an observation or a series alone. */
export const parseWaterml2: DocumentParser = (path, reading, sink, enough) =>
  readXml(path, reading, new Waterml2(sink, enough));

class Waterml2 implements ElementHandler {
  private readonly path: string[] = [];
  private readonly features = new Map<string, MonitoringPoint>();
  private readonly processes = new Map<string, { aggregation: string; statistic: string }>();
  private process = { aggregation: '', statistic: '' };
  private feature: MonitoringPoint | null = null;
  private qualifier: Qualifier | null = null;
  private inDefault = false;
  /** of the observation */
  private property = { title: '', href: '' };
  private foi = { href: '', title: '', point: null as MonitoringPoint | null };
  /** of the series */
  private base = '';
  private spacing = '';
  private preset: Point = newPoint();
  private presetMaking: Making = newMaking();
  private inSeries = false;
  private begun = false;
  private points = 0;
  /** of the point */
  private point: Point | null = null;
  private making: Making = newMaking();
  private quality = '';
  private nilReason = '';
  private head: SeriesHead | null = null;

  constructor(
    private readonly sink: SeriesSink,
    readonly enough: () => boolean,
  ) {}

  open(name: string, attributes: Attributes): void {
    this.path.push(name);
    if (this.qualifier !== null) this.qualifier.open(name, attributes);
    else if (this.feature !== null) this.feature.open(name, attributes);
    else if (this.point !== null || this.inDefault) this.openOfPoint(name, attributes);
    else this.openOther(name, attributes);
  }

  private openOfPoint(name: string, attributes: Attributes): void {
    const making = this.inDefault ? this.presetMaking : this.making;
    const parent = this.path.at(-2) ?? '';
    if (name === 'qualifier') this.qualifier = new Qualifier(attributes);
    else if (name === 'quality')
      this.quality = attribute(attributes, 'title') || lastPart(attribute(attributes, 'href'));
    else if (name === 'nilReason') {
      this.nilReason = attribute(attributes, 'title') || lastPart(attribute(attributes, 'href'));
    } else if (name === 'uom' && parent.endsWith('TVPMeasurementMetadata')) {
      making.unit = attribute(attributes, 'code') || attribute(attributes, 'title') || attribute(attributes, 'href');
    } else if (name === 'interpolationType') {
      making.interpolation = `${lastPart(attribute(attributes, 'href'))} ${attribute(attributes, 'title')}`.trim();
    } else if (name === 'value' && parent === 'MeasurementTVP')
      making.unit = attribute(attributes, 'uom') || making.unit;
  }

  private openOther(name: string, attributes: Attributes): void {
    const href = attribute(attributes, 'href');
    const title = attribute(attributes, 'title');
    if (name === 'OM_Observation') {
      this.property = { title: '', href: '' };
      this.foi = { href: '', title: '', point: null };
      this.process = { aggregation: '', statistic: '' };
    } else if (FEATURES.has(name)) this.feature = new MonitoringPoint(attributes);
    else if (name === 'observedProperty') this.property = { title, href };
    else if (name === 'featureOfInterest') this.foi = { href, title, point: null };
    else if (name === 'procedure') this.process = this.processes.get(href) ?? { aggregation: '', statistic: '' };
    else if (name === 'ObservationProcess') {
      this.process = { aggregation: '', statistic: '' };
      const id = attribute(attributes, 'id');
      if (id !== '' && this.processes.size < MOST_FEATURES) this.processes.set(`#${id}`, this.process);
    } else if (name === 'parameter' && this.path.includes('ObservationProcess')) {
      if (/statistic/i.test(title)) this.process.statistic = lastPart(href) || title;
    } else if (name === 'name' && title !== '' && this.process.statistic !== '') this.process.statistic += ` ${title}`;
    else if (name === 'MeasurementTimeseries') this.beginSeries();
    else if (name === 'CategoricalTimeseries') this.sink.categories++;
    else if (name === 'defaultPointMetadata') this.inDefault = true;
    else if (name === 'MeasurementTVP' && this.inSeries) this.beginPoint();
  }

  close(name: string, text: string): void {
    this.path.pop();
    const parent = this.path.at(-1) ?? '';
    if (this.qualifier !== null) this.closeQualifier(name, text);
    else if (this.feature !== null) this.closeFeature(name, text, parent);
    else if (name === 'MeasurementTVP' && this.point !== null) this.endPoint(this.point);
    else if (this.point !== null) {
      if (name === 'time') this.point.time = text.trim();
      else if (name === 'value' && parent === 'MeasurementTVP') this.point.value = text.trim();
      else if (name === 'aggregationDuration') this.making.aggregation = text.trim();
    } else if (name === 'defaultPointMetadata') this.endDefault();
    else if (name === 'aggregationDuration') {
      if (this.inDefault) this.presetMaking.aggregation = text.trim();
      else this.process.aggregation = text.trim();
    } else if (name === 'baseTime') this.base = text.trim();
    else if (name === 'spacing') this.spacing = text.trim();
    else if (name === 'MeasurementTimeseries') this.endSeries();
  }

  private closeQualifier(name: string, text: string): void {
    if (name !== 'qualifier') {
      this.qualifier?.close(name, text);
      return;
    }
    this.qualifier?.addTo(this.inDefault || this.point === null ? this.preset : this.point);
    this.qualifier = null;
  }

  private closeFeature(name: string, text: string, parent: string): void {
    const feature = this.feature as MonitoringPoint;
    if (!FEATURES.has(name)) {
      feature.close(name, text, parent);
      return;
    }
    this.feature = null;
    if (feature.warning) this.sink.warn(feature.warning);
    if (this.path.includes('featureOfInterest')) this.foi.point = feature;
    if (feature.id !== '' && this.features.size < MOST_FEATURES) this.features.set(`#${feature.id}`, feature);
  }

  private beginSeries(): void {
    this.inSeries = true;
    this.base = '';
    this.spacing = '';
    this.preset = newPoint();
    this.presetMaking = newMaking();
    this.begun = false;
    this.quality = '';
    this.head = null;
    this.points = 0;
  }

  private endSeries(): void {
    this.inSeries = false;
    if (!this.begun) this.sink.emptySeries++;
  }

  private endDefault(): void {
    this.inDefault = false;
    addQuality(this.preset, this.quality);
    this.quality = '';
    this.nilReason = '';
  }

  private beginPoint(): void {
    this.point = newPoint();
    this.making = newMaking();
    this.quality = '';
    this.nilReason = '';
  }

  private endPoint(point: Point): void {
    this.point = null;
    const number = this.points++;
    if (point.time === '' && this.spacing !== '')
      point.time = spacedTime({ base: this.base, spacing: this.spacing }, number);
    if (point.time === '' && point.value === '') {
      this.sink.emptyPoints++;
      return;
    }
    addQuality(point, this.quality);
    if (this.nilReason !== '' && !/^missing$/i.test(this.nilReason)) point.valueText ??= this.nilReason;
    // A point with qualifiers of its own is not what the series says of all others.
    if (point.flag === '' && point.bits === 0 && !point.exact) {
      point.flag = this.preset.flag;
      point.bits = this.preset.bits;
      point.exact = this.preset.exact;
    }
    if (this.head === null) this.beginPoints();
    const { unit, interpolation } = this.making;
    const head = this.head as unknown as SeriesHead;
    if (unit !== '' && unit !== head.unitText) point.value = `${point.value} ${unit}`;
    if (interpolation !== '') point.meaning = meaningOf(interpolation);
    this.sink.point(point);
  }

  private beginPoints(): void {
    this.begun = true;
    const making = this.presetMaking;
    const interpolation = making.interpolation || this.making.interpolation;
    const feature = this.foi.point ?? this.features.get(this.foi.href) ?? null;
    const statistic = extremeOf(interpolation) || this.process.statistic;
    this.head = {
      names: stationNames(feature, this.foi),
      facts: feature?.facts(this.foi.title) ?? (this.foi.title === '' ? {} : { name: this.foi.title }),
      property: this.property.title,
      propertyCode: lastPart(this.property.href),
      statistic: statisticNamed(statistic),
      // Of “MinPrec Minimum in preceding interval” the words say more.
      statisticText: statistic.replace(/^(?:max|min)\w*\s+(?=\S)/i, ''),
      unitText: making.unit || this.making.unit,
      meaning: meaningOf(interpolation),
      stepDays:
        durationDays(this.spacing) ?? durationDays(making.aggregation) ?? durationDays(this.process.aggregation),
      noData: [],
    };
    this.sink.begin(this.head);
  }
}

const newPoint = (): Point => ({ time: '', value: '', flag: '', bits: 0 });
const newMaking = (): Making => ({ interpolation: '', unit: '', aggregation: '' });

/** A quality beside or in place of a qualifier: “estimate”, “suspect”, “unchecked”. */
function addQuality(point: Point, quality: string): void {
  if (quality === '' || point.exact) return;
  point.flag = point.flag === '' ? quality : `${point.flag}; ${quality}`;
  point.bits |= sentenceBits(quality);
}
