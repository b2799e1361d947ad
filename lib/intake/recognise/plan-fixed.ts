import { FixedWidthLines } from '../rows/fixed-width.ts';
import { type AlsoCandidate, type FieldPlace, IntakeError, type Mapping, type ValueCandidate } from '../types.ts';
import { isDay, isMonth, isYear } from './column-facts.ts';
import { findUnit, unitProblem } from './find-unit.ts';
import { type FixedSlices, findFixedSlices, type Slice } from './fixed-slices.ts';
import { readLinesAbove, stationAbove } from './lines-above.ts';
import type { PlanContext } from './plan-columns.ts';
import { stationProblem } from './plan-problems.ts';
import { stationOf } from './recognised-mapping.ts';
import { type SampleLine, splitSample } from './sample.ts';
import { SHOWN_ROWS, type TablePlan } from './table-plan.ts';

const words = ([start, end]: Slice): string => `characters ${start + 1}–${end}`;

/** A plan for rows at fixed characters. The date is recognised; which of the numbers is the flow is never guessed.
 *  @returns null when the lines do not look like it and no mapping says that they are */
export function planFixedWidth(lines: readonly SampleLine[], context: PlanContext): TablePlan | null {
  const { options, lineEnd, marked } = context;
  const given = options.mapping ?? {};
  const { guess, first } = belowTitles(lines) ?? { guess: null, first: 0 };
  if (given.layout !== 'fixed-width' && guess === null) return null;
  const file = options.fileName;
  const body = lines.slice(first);
  const titles = lines.slice(0, first).map(({ line, text }) => ({ text, row: { line, fields: [text] } }));
  const above = readLinesAbove(context.comments, titles, { delimiter: null, firstLine: body[0].line });
  const unit = options.unit ?? given.unit ?? findUnit({ headings: [], unitText: '', ...above });
  const mapping: Mapping = {
    layout: 'fixed-width',
    station: stationOf({ wide: null, station: null }, options, above.facts),
    date: { columns: guess?.date ?? [], order: 'ymd' },
    value: null,
    flag: null,
    missing: [],
    decimal: '.',
    ...given,
    unit,
  };
  const problems: IntakeError[] = [];
  if (mapping.date.columns.length === 0) {
    problems.push(mappingProblem(file, 'no year, month and day stand at the same characters on every line'));
  } else if (mapping.value === null) {
    problems.push(
      mappingProblem(file, 'the rows hold several numbers at fixed characters; which are the flows is not said'),
    );
  }
  if (unit === null) problems.push(unitProblem(file, null, given.quantity));
  if (mapping.station.from === 'lines-above' && stationAbove(above.facts, options.knownStations) === null)
    problems.push(stationProblem(file));

  const slices = [...mapping.date.columns.map((place) => asSlice(place, file))];
  const place = (wanted: FieldPlace | null): number => {
    if (wanted === null) return -1;
    slices.push(asSlice('slice' in wanted ? wanted.slice : wanted.column, file));
    return slices.length - 1;
  };
  const places = {
    date: mapping.date.columns.map((_, at) => at),
    ...{ station: -1, value: place(mapping.value), flag: place(mapping.flag), where: -1, unit: -1 },
  };
  const shown = [...slices, ...(mapping.value === null ? (guess?.values ?? []) : [])];
  return {
    ...{ file, mapping, lineEnd, marked, header: null, places, problems },
    splitter: new FixedWidthLines(slices, lineEnd),
    firstLine: body[0].line,
    ...(context.sign === null ? {} : { comment: new TextEncoder().encode(context.sign) }),
    ...{ facts: above.facts, codesAbove: above.codes },
    fieldCount: slices.length,
    leastFields: slices.length,
    wide: null,
    unitText: '',
    orderOpen: false,
    repeatsHeader: false,
    preview: splitSample(body.slice(0, SHOWN_ROWS), new FixedWidthLines(shown, lineEnd)).map(({ fields }) => fields),
    previewLines: body.slice(0, SHOWN_ROWS).map(({ line }) => line),
    valueCandidates: (guess?.values ?? []).map((slice) => candidate(slice, body)),
    others: mapping.value === null ? [] : otherSlices(guess?.values ?? [], mapping.value, body),
    warnings: [],
  };
}

/** The numbers that the mapping does not read; of what they are, only the file's makers know. */
function otherSlices(slices: readonly Slice[], value: FieldPlace, body: readonly SampleLine[]): AlsoCandidate[] {
  const taken = 'slice' in value ? value.slice[1] : -1;
  return slices
    .filter(([, end]) => end !== taken)
    .map((slice) => ({ ...candidate(slice, body), quantity: null, unit: null, value: { slice }, flag: null }))
    .map(({ place: _, ...other }) => other);
}

/** Title lines that are tried to be left out. */
const MOST_TITLES = 60;

/** Where the numbers stand, and the first line that has them: below any lines of titles. */
function belowTitles(lines: readonly SampleLine[]): { guess: FixedSlices; first: number } | null {
  for (let skipped = 0; skipped <= Math.min(MOST_TITLES, lines.length - 3); skipped++) {
    const guess = findFixedSlices(lines.slice(skipped));
    if (guess === null) continue;
    const [year, month, day] = guess.date;
    const isRow = ({ text }: SampleLine) =>
      isYear(text.slice(...year)) && isMonth(text.slice(...month).trim()) && isDay(text.slice(...day).trim());
    return { guess, first: Math.max(0, lines.findIndex(isRow)) };
  }
  return null;
}

function candidate(slice: Slice, body: readonly SampleLine[]): ValueCandidate {
  const samples = body.slice(0, 5).map(({ text }) => text.slice(...slice).trim());
  return { place: { slice }, label: words(slice), samples };
}

function mappingProblem(file: string, message: string): IntakeError {
  return new IntakeError({
    file,
    message,
    remedy: 'Choose the column on the screen, or give a mapping such as {"value": {"slice": [28, 38]}, "unit": "mm/d"}',
    needs: 'mapping',
  });
}

function asSlice(place: number | string | [number, number], file: string): Slice {
  if (Array.isArray(place)) return place;
  throw new IntakeError({
    file,
    value: String(place),
    message: 'a fixed-width file has no columns, only characters',
    remedy: 'Give a slice such as [28, 38]: positions from 0, end exclusive',
    needs: 'mapping',
  });
}
