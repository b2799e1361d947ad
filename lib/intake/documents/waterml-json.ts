import { JSONParser } from '@streamparser/json';
import { IntakeError } from '../types.ts';
import type { DocumentParser } from './document-reader.ts';
import { CHECK_DOCUMENT, DEEPEST, LONGEST_PIECE } from './limits.ts';
import { documentText } from './read-text.ts';
import type { SeriesSink } from './series-sink.ts';
import { headOf, noFacts, qualifierBits, type Waterml1Facts } from './waterml-1-series.ts';

/** What is put together whole; all else passes by. Some keep the list of series without what a service wraps it in. */
const PIECES = ['sourceInfo', 'variable', 'values.*.value.*', 'values.*.qualifier'];
const PATHS = ['$.value.timeSeries.*', '$.timeSeries.*'].flatMap((series) =>
  PIECES.map((piece) => `${series}.${piece}`),
);

/** Reads the JSON form of WaterML 1.1, point by point, in memory bounded by one point.
 *  @throws IntakeError when it is not well-formed, too deep, or has endless texts */
export const parseWatermlJson: DocumentParser = async (path, reading, sink, enough) => {
  const series = new JsonSeries(reading.file, sink);
  const parser = new JSONParser({ paths: PATHS, keepStack: false });
  let read = 0;
  let depth = 0;
  let sinceToken = 0;
  const refuse = (message: string, remedy: string): IntakeError =>
    new IntakeError({ file: reading.file, value: `near character ${read}`, message, remedy });
  parser.onToken = ({ value }) => {
    sinceToken = 0;
    if (value === '{' || value === '[') depth++;
    else if (value === '}' || value === ']') depth--;
    if (depth > DEEPEST) throw refuse(`lists stand more than ${DEEPEST} deep in one another`, CHECK_DOCUMENT);
  };
  parser.onValue = ({ value, key, stack }) => series.take(value, [...stack.slice(1).map((one) => one.key), key]);
  parser.onError = (cause) => {
    if (cause instanceof IntakeError) throw cause;
    const cut = /mid-parsing|ended/i.test(cause.message);
    const error = refuse(
      cut ? 'the document is cut short' : 'the document is not well-formed JSON',
      cut ? 'Get it again, whole' : 'Get it again; it is damaged',
    );
    error.cause = cause;
    throw error;
  };
  for await (const piece of documentText(path, reading)) {
    // White space behind the end is none of the document.
    if (parser.isEnded && piece.trim() === '') continue;
    sinceToken += piece.length;
    parser.write(piece);
    read += piece.length;
    if (sinceToken > LONGEST_PIECE) throw refuse(`a text is longer than ${LONGEST_PIECE / 1024} kB`, CHECK_DOCUMENT);
    if (enough()) return;
  }
  if (!parser.isEnded) parser.end();
  series.end();
};

/** Puts the pieces of one series after another together. */
class JsonSeries {
  private number: number | string | undefined = undefined;
  private facts: Waterml1Facts = noFacts();
  private points = 0;
  private described = false;

  constructor(
    private readonly file: string,
    private readonly sink: SeriesSink,
  ) {}

  /** @param keys  where the piece stands in the document, from its root */
  take(value: unknown, keys: readonly (number | string | undefined)[]): void {
    const at = keys[0] === 'timeSeries' ? 1 : 2;
    if (keys[at] !== this.number) {
      this.end();
      this.number = keys[at];
      this.facts = noFacts();
      this.points = 0;
      this.described = false;
    }
    const piece = keys[at + 1];
    if (piece === 'sourceInfo') takeSite(this.facts, value);
    else if (piece === 'variable') {
      takeVariable(this.facts, value);
      this.described = true;
    } else if (keys[at + 3] === 'qualifier') this.sink.explain(qualifierBits(list(value).map(qualifierOf)));
    else this.point(value);
  }

  private point(value: unknown): void {
    const time = text(value, 'dateTime');
    const content = text(value, 'value').trim();
    if (time === '' && content === '') {
      this.sink.emptyPoints++;
      return;
    }
    if (this.points++ === 0) {
      if (!this.described) {
        throw new IntakeError({
          ...{ file: this.file, value: time },
          message: 'a series gives its values before it says what they are of',
          remedy: 'Get the document in the form in which services send it: sourceInfo, variable, values',
        });
      }
      this.sink.begin(headOf(this.facts));
    }
    const qualifiers = list(field(value, 'qualifiers')).map((one) => (typeof one === 'string' ? one : ''));
    this.sink.point({ time, value: content, flag: qualifiers.join(' '), bits: 0 });
  }

  /** The series at hand is over. */
  end(): void {
    if (this.number !== undefined && this.points === 0) this.sink.emptySeries++;
    this.number = undefined;
  }
}

function takeSite(facts: Waterml1Facts, site: unknown): void {
  const place = field(field(site, 'geoLocation'), 'geogLocation');
  facts.siteName = text(site, 'siteName');
  facts.siteCode = text(list(field(site, 'siteCode'))[0], 'value');
  facts.latitude = number(field(place, 'latitude'));
  facts.longitude = number(field(place, 'longitude'));
}

function takeVariable(facts: Waterml1Facts, variable: unknown): void {
  facts.variableCode = text(list(field(variable, 'variableCode'))[0], 'value');
  facts.variableName = text(variable, 'variableName');
  facts.description = text(variable, 'variableDescription');
  facts.unit = text(field(variable, 'unit'), 'unitCode') || text(field(variable, 'unit'), 'unitAbbreviation');
  facts.noData = text(variable, 'noDataValue');
  facts.dataType = text(variable, 'dataType');
  const options = list(field(field(variable, 'options'), 'option'));
  const statistic = options.find((option) => /statistic/i.test(text(option, 'name')));
  facts.statisticCode = text(statistic, 'optionCode');
  facts.statisticName = text(statistic, 'value');
}

const qualifierOf = (one: unknown): { code: string; description: string } => ({
  code: text(one, 'qualifierCode'),
  description: text(one, 'qualifierDescription'),
});

function field(of: unknown, name: string): unknown {
  return typeof of === 'object' && of !== null && Object.hasOwn(of, name)
    ? (of as Record<string, unknown>)[name]
    : null;
}

/** A field as text; empty where there is none. */
function text(of: unknown, name: string): string {
  const value = field(of, name);
  return typeof value === 'string' ? value : typeof value === 'number' ? String(value) : '';
}

function number(value: unknown): number {
  return typeof value === 'number' ? value : Number(typeof value === 'string' && value !== '' ? value : Number.NaN);
}

function list(value: unknown): unknown[] {
  return Array.isArray(value) ? value : [];
}
