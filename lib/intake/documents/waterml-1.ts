import type { DocumentParser } from './document-reader.ts';
import type { SeriesSink } from './series-sink.ts';
import { headOf, noFacts, qualifierBits, type Waterml1Facts } from './waterml-1-series.ts';
import { type Attributes, attribute, type ElementHandler, readXml } from './xml-events.ts';

/** Qualifiers that a series may explain; a document with more has been made to fill the memory. */
const MOST_QUALIFIERS = 10_000;

/** Reads WaterML 1.0 and 1.1 (timeSeriesResponse), as hydrological web services send it. */
export const parseWaterml1: DocumentParser = (path, reading, sink, enough) =>
  readXml(path, reading, new Waterml1(sink, enough));

class Waterml1 implements ElementHandler {
  private readonly path: string[] = [];
  private facts: Waterml1Facts = noFacts();
  /** points of the series so far, and of the `values` at hand */
  private points = 0;
  private inValues = false;
  private value: Attributes = {};
  private option: Attributes = {};
  private unitAttributes: Attributes = {};
  private qualifiers: { code: string; description: string }[] = [];

  constructor(
    private readonly sink: SeriesSink,
    readonly enough: () => boolean,
  ) {}

  open(name: string, attributes: Attributes): void {
    this.path.push(name);
    if (name === 'value' && this.inValues) this.value = attributes;
    else if (name === 'timeSeries') {
      this.facts = noFacts();
      this.points = 0;
    } else if (name === 'values') {
      this.inValues = true;
      this.qualifiers = [];
    } else if (name === 'option') this.option = attributes;
    else if (name === 'units') this.unitAttributes = attributes;
    else if (name === 'qualifier' && this.qualifiers.length < MOST_QUALIFIERS) {
      this.qualifiers.push({ code: attribute(attributes, 'qualifierCode'), description: '' });
    }
  }

  close(name: string, text: string): void {
    this.path.pop();
    const content = text.trim();
    if (name === 'value' && this.inValues) this.endValue(content);
    else if (name === 'values') {
      this.sink.explain(qualifierBits(this.qualifiers));
      this.inValues = false;
    } else if (name === 'timeSeries') {
      if (this.points === 0) this.sink.emptySeries++;
    } else if (this.inValues) this.closeQualifier(name, content);
    else this.closeFact(name, content, this.path.at(-1) ?? '');
  }

  private endValue(content: string): void {
    const time = attribute(this.value, 'dateTime');
    if (time === '' && content === '') {
      this.sink.emptyPoints++;
      return;
    }
    if (this.points++ === 0) this.sink.begin(headOf(this.facts));
    const flag = attribute(this.value, 'qualifiers');
    const censored = attribute(this.value, 'censorCode') === 'lt';
    this.sink.point({ time, value: content, flag, bits: 0, ...(censored ? { valueText: '<' } : {}) });
  }

  private closeQualifier(name: string, content: string): void {
    const qualifier = this.qualifiers.at(-1);
    if (qualifier === undefined) return;
    if (name === 'qualifierCode') qualifier.code = content;
    else if (name === 'qualifierDescription') qualifier.description = content;
    else if (name === 'qualifier') qualifier.description ||= content;
  }

  private closeFact(name: string, content: string, parent: string): void {
    const { facts } = this;
    if (name === 'siteCode') facts.siteCode ||= content;
    else if (name === 'siteName') facts.siteName = content;
    else if (name === 'latitude') facts.latitude = Number(content || Number.NaN);
    else if (name === 'longitude') facts.longitude = Number(content || Number.NaN);
    else if (name === 'variableCode') facts.variableCode ||= content;
    else if (name === 'variableName') facts.variableName = content;
    else if (name === 'variableDescription') facts.description = content;
    else if (name === 'dataType') facts.dataType = content;
    else if (name === 'noDataValue' || name === 'NoDataValue') facts.noData = content;
    else if (name === 'option' && /statistic/i.test(attribute(this.option, 'name'))) {
      facts.statisticCode = attribute(this.option, 'optionCode') || attribute(this.option, 'optionID');
      facts.statisticName = content;
    } else if (parent === 'unit' && this.path.at(-2) === 'variable') {
      if (name === 'unitCode' || name === 'unitAbbreviation') facts.unit = content || facts.unit;
      else if (name === 'unitName') facts.unit ||= content;
    } else if (name === 'units' && parent === 'variable') {
      facts.unit = attribute(this.unitAttributes, 'unitsAbbreviation') || content;
    }
  }
}
