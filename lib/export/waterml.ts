import { isoDate } from '../calendar/day.ts';
import { UCUM } from '../intake/documents/unit-code.ts';
import type { StationFacts } from '../region/ranking-types.ts';
import { type DayCode, NO_ROW } from '../series/day-codes.ts';
import type { Quantity, Unit } from '../series/quantities.ts';
import { databasePath } from '../store/database-url.ts';
import { DICTIONARY, pointMetadata, usualCode } from './waterml-points.ts';
import { recordsAsTheyStand } from './waterml-records.ts';
import { attributeText, elementText } from './xml-text.ts';

/** Code of a day that has no row, see StagedPart. */
const PIECE = 1 << 16;
const INTERPOLATION = 'http://www.opengis.net/def/waterml/2.0/interpolationType';

/** Daily values of one station, as they are to be written. */
export interface WrittenSeries {
  quantity: Quantity;
  /** of the values */
  unit: Unit;
  firstDay: number;
  /** NaN = missing */
  values: Float64Array;
  /** index into `codeList` a day; NO_ROW where no point is written for the day */
  codes: Uint8Array;
  codeList: readonly DayCode[];
}

export type WrittenStation = Pick<StationFacts, 'code' | 'name' | 'river' | 'latitude' | 'longitude' | 'areaKm2'>;

const PROPERTIES: Record<Quantity, { title: string; interpolation: string; words: string }> = {
  flow: { title: 'River discharge', interpolation: 'AverageSucc', words: 'Average in succeeding interval' },
  stage: { title: 'Water level (stage)', interpolation: 'AverageSucc', words: 'Average in succeeding interval' },
  rainfall: { title: 'Rainfall', interpolation: 'TotalSucc', words: 'Succeeding total' },
  'potential-evaporation': { title: 'Potential evaporation', interpolation: 'TotalSucc', words: 'Succeeding total' },
};

/** The records of a station as they stand, as a document of WaterML 2.0, piece by piece. */
export function* waterml(
  station: StationFacts,
  { generated = new Date(), path = databasePath() }: { generated?: Date; path?: string } = {},
): Generator<string> {
  yield* watermlDocument([{ station, series: recordsAsTheyStand(station.id, path) }], generated);
}

/** Daily values as a document of WaterML 2.0 (OGC 10-126r4), valid against its schema: a collection with an observation
 *  for each station and quantity. Piece by piece; no more than one series is looked at a time.
 *
 *  A point's time is the date of its day. The value is the mean over that day, so over the interval that begins with the
 *  time: “average in succeeding interval” (sums, of depths), aggregated over P1D. The average in the *preceding* interval,
 *  which services often write, would need the midnight that ends the day, and lets readers take it for the day after.
 *  Numbers are the shortest decimals that read back as the same; units are UCUM codes. A missing value is nil for the
 *  reason “missing”. What a file wrote beside a value, and what was understood by it, stands in qualifiers that the
 *  document's dictionary explains; the flags of most days are those of the series, and not repeated.
 *  @param stations   each with its series, which are asked for when their turn has come
 *  @param generated  the time of writing, which the standard asks for */
export function* watermlDocument(
  stations: Iterable<{ station: WrittenStation; series: Iterable<WrittenSeries> }>,
  generated: Date,
): Generator<string> {
  yield headText(generated);
  let number = 0;
  for (const { station, series } of stations) {
    number++;
    let within = 0;
    for (const one of series) {
      if (one.codes.every((code) => code === NO_ROW)) continue;
      within++;
      // The station stands in its first observation; the others refer to it.
      const feature =
        within === 1
          ? `<om:featureOfInterest>${monitoringPoint(`station-${number}`, station)}</om:featureOfInterest>`
          : `<om:featureOfInterest xlink:href="#station-${number}" xlink:title="${attributeText(station.name)}"/>`;
      yield* observation(`${number}-${within}`, feature, one);
    }
  }
  yield '</wml2:Collection>\n';
}

function* observation(id: string, feature: string, series: WrittenSeries): Generator<string> {
  const { quantity, unit, firstDay, values, codes, codeList } = series;
  const { title, interpolation, words } = PROPERTIES[quantity];
  const first = codes.findIndex((code) => code !== NO_ROW);
  const last = codes.findLastIndex((code) => code !== NO_ROW);
  const [begin, end] = [isoDate(firstDay + first), isoDate(firstDay + last)];
  const usual = usualCode(series);
  yield `<wml2:observationMember><om:OM_Observation gml:id="observation-${id}">
<om:phenomenonTime><gml:TimePeriod gml:id="period-${id}"><gml:beginPosition>${begin}</gml:beginPosition><gml:endPosition>${end}</gml:endPosition></gml:TimePeriod></om:phenomenonTime>
<om:resultTime/>
<om:procedure><wml2:ObservationProcess gml:id="process-${id}"><wml2:processType xlink:href="http://www.opengis.net/def/waterml/2.0/processType/Algorithm" xlink:title="Algorithm"/><wml2:aggregationDuration>P1D</wml2:aggregationDuration></wml2:ObservationProcess></om:procedure>
<om:observedProperty xlink:title="${title}"/>
${feature}
<om:result><wml2:MeasurementTimeseries gml:id="series-${id}">
<wml2:defaultPointMetadata><wml2:DefaultTVPMeasurementMetadata>${usual === null ? '' : pointMetadata(codeList[usual], false)}<wml2:uom code="${UCUM[unit]}" xlink:title="${unit}"/><wml2:interpolationType xlink:href="${INTERPOLATION}/${interpolation}" xlink:title="${words}"/><wml2:aggregationDuration>P1D</wml2:aggregationDuration></wml2:DefaultTVPMeasurementMetadata></wml2:defaultPointMetadata>
`;
  const beside = (missing: boolean) =>
    codeList.map((code, number) => {
      const metadata = number === usual && !missing ? '' : pointMetadata(code, missing, usual !== null);
      if (metadata === '') return '';
      return `<wml2:metadata><wml2:TVPMeasurementMetadata>${metadata}</wml2:TVPMeasurementMetadata></wml2:metadata>`;
    });
  const [besideValue, besideNone] = [beside(false), beside(true)];
  let text = '';
  for (let at = first; at <= last; at++) {
    const code = codes[at];
    if (code === NO_ROW) continue;
    const value = values[at];
    const missing = Number.isNaN(value);
    const written = missing ? '<wml2:value xsi:nil="true"/>' : `<wml2:value>${value}</wml2:value>`;
    text += `<wml2:point><wml2:MeasurementTVP><wml2:time>${isoDate(firstDay + at)}</wml2:time>${written}${(missing ? besideNone : besideValue)[code]}</wml2:MeasurementTVP></wml2:point>\n`;
    if (text.length < PIECE) continue;
    yield text;
    text = '';
  }
  yield `${text}</wml2:MeasurementTimeseries></om:result>
</om:OM_Observation></wml2:observationMember>
`;
}

function monitoringPoint(id: string, station: WrittenStation): string {
  const { code, name, river, latitude, longitude, areaKm2 } = station;
  const placed = latitude !== null && longitude !== null;
  const area =
    areaKm2 === null
      ? ''
      : `<sa:parameter><om:NamedValue><om:name xlink:title="Drainage area"/><om:value xsi:type="gml:MeasureType" uom="km2">${areaKm2}</om:value></om:NamedValue></sa:parameter>`;
  return `<wml2:MonitoringPoint gml:id="${id}"><gml:identifier codeSpace="">${elementText(code)}</gml:identifier>${
    name === '' ? '' : `<gml:name>${elementText(name)}</gml:name>`
  }<sa:sampledFeature${river === '' ? ' nilReason="unknown"' : ` xlink:title="${attributeText(river)}"`}/>${area}${
    placed
      ? `<sams:shape><gml:Point gml:id="${id}-place"><gml:pos srsName="http://www.opengis.net/def/crs/EPSG/0/4326">${latitude} ${longitude}</gml:pos></gml:Point></sams:shape>`
      : '<sams:shape nilReason="unknown"/>'
  }</wml2:MonitoringPoint>`;
}

const NAMESPACES = {
  wml2: 'http://www.opengis.net/waterml/2.0',
  om: 'http://www.opengis.net/om/2.0',
  sa: 'http://www.opengis.net/sampling/2.0',
  sams: 'http://www.opengis.net/samplingSpatial/2.0',
  gml: 'http://www.opengis.net/gml/3.2',
  swe: 'http://www.opengis.net/swe/2.0',
  xlink: 'http://www.w3.org/1999/xlink',
  xsi: 'http://www.w3.org/2001/XMLSchema-instance',
};
const SCHEMA = 'http://www.opengis.net/waterml/2.0 http://schemas.opengis.net/waterml/2.0/waterml2.xsd';

const TERMS = DICTIONARY.map(
  ({ id, name, remarks }) =>
    `<gml:dictionaryEntry><gml:Definition gml:id="${id}"><gml:identifier codeSpace="">${id}</gml:identifier><gml:name>${name}</gml:name><gml:remarks>${remarks}</gml:remarks></gml:Definition></gml:dictionaryEntry>\n`,
).join('');

const headText = (generated: Date): string => `<?xml version="1.0" encoding="UTF-8"?>
<wml2:Collection ${Object.entries(NAMESPACES)
  .map(([prefix, uri]) => `xmlns:${prefix}="${uri}"`)
  .join(' ')} xsi:schemaLocation="${SCHEMA}" gml:id="collection">
<wml2:metadata><wml2:DocumentMetadata gml:id="document"><wml2:generationDate>${generated.toISOString()}</wml2:generationDate><wml2:version xlink:href="http://www.opengis.net/waterml/2.0" xlink:title="WaterML 2.0"/><wml2:generationSystem>Hungerstone</wml2:generationSystem></wml2:DocumentMetadata></wml2:metadata>
<wml2:localDictionary><gml:Dictionary gml:id="qualifiers"><gml:identifier codeSpace="">qualifiers</gml:identifier>
${TERMS}</gml:Dictionary></wml2:localDictionary>
`;
