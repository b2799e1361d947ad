/** Documents of WaterML 2.0 as the tests need them. Elements and attributes are those of OGC 10-126r4. */

const NAMESPACES = [
  'xmlns:wml2="http://www.opengis.net/waterml/2.0" xmlns:om="http://www.opengis.net/om/2.0"',
  'xmlns:gml="http://www.opengis.net/gml/3.2" xmlns:sa="http://www.opengis.net/sampling/2.0"',
  'xmlns:sams="http://www.opengis.net/samplingSpatial/2.0" xmlns:swe="http://www.opengis.net/swe/2.0"',
  'xmlns:xlink="http://www.w3.org/1999/xlink" xmlns:xsi="http://www.w3.org/2001/XMLSchema-instance"',
].join(' ');

export interface SeriesText {
  station?: string;
  name?: string;
  river?: string;
  /** text of gml:pos with its srsName */
  position?: { srs: string; pos: string };
  property?: string;
  /** attributes of uom */
  uom?: string;
  interpolation?: string;
  aggregation?: string;
  spacing?: { base: string; step: string };
  /** further default metadata, before uom */
  defaults?: string;
  points: string[];
}

/** A point with what may stand beside its value. */
export function point(time: string | null, value: string | null, metadata = ''): string {
  const timeText = time === null ? '' : `<wml2:time>${time}</wml2:time>`;
  const valueText =
    value === null ? '' : value === 'nil' ? '<wml2:value xsi:nil="true"/>' : `<wml2:value>${value}</wml2:value>`;
  const beside =
    metadata === ''
      ? ''
      : `<wml2:metadata><wml2:TVPMeasurementMetadata>${metadata}</wml2:TVPMeasurementMetadata></wml2:metadata>`;
  return `<wml2:point><wml2:MeasurementTVP>${timeText}${valueText}${beside}</wml2:MeasurementTVP></wml2:point>`;
}

/** Daily points from 2001-01-01 on. */
export const daily = (values: string[]): string[] =>
  values.map((value, at) => point(`2001-01-${String(at + 1).padStart(2, '0')}`, value));

function member(series: SeriesText): string {
  const { station = '0306', name, river, position, property = 'Discharge', uom = 'code="m3/s"' } = series;
  const { interpolation, aggregation, spacing, defaults = '', points } = series;
  return `<wml2:observationMember><om:OM_Observation>
<om:observedProperty xlink:title="${property}"/>
<om:featureOfInterest><wml2:MonitoringPoint gml:id="p-${station}"><gml:identifier codeSpace="">${station}</gml:identifier>${
    name === undefined ? '' : `<gml:name>${name}</gml:name>`
  }<sa:sampledFeature${river === undefined ? '' : ` xlink:title="${river}"`}/>${
    position === undefined
      ? ''
      : `<sams:shape><gml:Point><gml:pos srsName="${position.srs}">${position.pos}</gml:pos></gml:Point></sams:shape>`
  }</wml2:MonitoringPoint></om:featureOfInterest>
<om:result><wml2:MeasurementTimeseries>${
    spacing === undefined
      ? ''
      : `<wml2:metadata><wml2:MeasurementTimeseriesMetadata><wml2:baseTime>${spacing.base}</wml2:baseTime><wml2:spacing>${spacing.step}</wml2:spacing></wml2:MeasurementTimeseriesMetadata></wml2:metadata>`
  }<wml2:defaultPointMetadata><wml2:DefaultTVPMeasurementMetadata>${defaults}<wml2:uom ${uom}/>${
    interpolation === undefined
      ? ''
      : `<wml2:interpolationType xlink:href="http://www.opengis.net/def/waterml/2.0/interpolationType/${interpolation}"/>`
  }${aggregation === undefined ? '' : `<wml2:aggregationDuration>${aggregation}</wml2:aggregationDuration>`}</wml2:DefaultTVPMeasurementMetadata></wml2:defaultPointMetadata>
${points.join('\n')}
</wml2:MeasurementTimeseries></om:result></om:OM_Observation></wml2:observationMember>`;
}

/** A collection of series. */
export function collection(...series: SeriesText[]): string {
  return `<?xml version="1.0" encoding="UTF-8"?>\n<wml2:Collection ${NAMESPACES}>\n${series.map(member).join('\n')}\n</wml2:Collection>\n`;
}

/** A document of the standard's namespaces around any content. */
export const documentOf = (content: string): string => `<wml2:Collection ${NAMESPACES}>${content}</wml2:Collection>`;
