import { INFLUENCES, type Influence } from '../../region/ranking-types.ts';
import type { RegistryStation } from '../types.ts';
import { parseChanges } from './dated-changes.ts';
import { parseDegrees } from './degrees.ts';
import { HISTORY_JSON, parseJsonField } from './history-json.ts';
import { namedFlowsOf } from './named-flow-columns.ts';
import { type CommaMeaning, isNothing, parseFigure } from './number-signs.ts';
import { areaFactorOf, type RegistryColumns } from './registry-columns.ts';
import type { RowProblem } from './row-problem.ts';

/** How influence is put in other registries. */
const INFLUENCE_WORDS: [RegExp, Influence][] = [
  [/^(natural|near natural|reference|unregulated|undisturbed|none)$/, 'natural'],
  [/^(regulated|reservoir|dam|regulation)$/, 'regulated'],
  [/^(abstracted|abstraction|diverted|diversion|withdrawal)$/, 'abstracted'],
  [/^(augmented|augmentation|discharge|effluent)$/, 'augmented'],
  [/^(spring|springs|spring fed|karst)$/, 'spring-fed'],
  [/^(urban|urbanised|urbanized)$/, 'urban'],
  [/^(unknown|)$/, 'unknown'],
];

/** The influence that a text names; null when it names none. */
function influenceOf(text: string): Influence | null {
  const plain = text.trim().toLowerCase();
  const exact = INFLUENCES.find((influence) => influence === plain);
  const words = plain.replace(/[-_\s]+/g, ' ');
  return exact ?? INFLUENCE_WORDS.find(([pattern]) => pattern.test(words))?.[1] ?? null;
}

/** How the numbers of a registry are written. */
export interface RowFormat {
  /** km² in one unit of the area column; null when the row's unit column says it */
  areaFactor: number | null;
  comma: CommaMeaning;
}

/** No river drains more: the Amazon, which drains most, some 7 million km². */
const LARGEST_KM2 = 1e7;

type Fact<T> = T | RowProblem;
const isProblem = <T>(fact: Fact<T>): fact is RowProblem =>
  typeof fact === 'object' && fact !== null && 'reason' in fact;

/** Reads one row. Empty fields are facts that nobody knows: null. Whether a position lies on Earth is left to
 *  `checkPositions`, for it may be swapped. */
export function readRegistryRow(
  fields: readonly string[],
  columns: RegistryColumns,
  format: RowFormat,
): RegistryStation | RowProblem {
  const text = (column: number) => (column < 0 ? '' : (fields[column] ?? '').trim());
  const code = text(columns.code);
  if (code === '') return { value: '', reason: 'the row has no station code', remedy: 'Give every station a code' };
  const position = positionOf(code, { latitude: text(columns.latitude), longitude: text(columns.longitude) });
  if (isProblem(position)) return position;
  const areaKm2 = areaOf(text(columns.areaKm2), text(columns.areaUnit), format);
  if (isProblem(areaKm2)) return areaKm2;
  const influence = influenceOf(text(columns.influence));
  if (influence === null) {
    const remedy = `Write one of ${INFLUENCES.join(', ')}`;
    return { value: text(columns.influence), reason: 'the influence is none that is known', remedy };
  }
  const history = historyOf(text, columns, format);
  if (isProblem(history)) return history;
  const name = text(columns.name) || code;
  return { code, name, river: text(columns.river), ...position, influence, areaKm2, ...history };
}

function positionOf(
  code: string,
  texts: { latitude: string; longitude: string },
): Fact<Pick<RegistryStation, 'latitude' | 'longitude'>> {
  // Degrees are not counted in thousands: a comma without a point is the decimal sign.
  const read = (axis: 'latitude' | 'longitude') =>
    isNothing(texts[axis]) ? null : parseDegrees(texts[axis], axis, !texts[axis].includes('.'));
  const [latitude, longitude] = [read('latitude'), read('longitude')];
  if (Number.isNaN(latitude)) return outside('latitude', texts.latitude);
  if (Number.isNaN(longitude)) return outside('longitude', texts.longitude);
  if ((latitude === null) === (longitude === null)) return { latitude, longitude };
  const [has, lacks] = latitude === null ? ['longitude', 'latitude'] : ['latitude', 'longitude'];
  return { value: code, reason: `the row has a ${has} but no ${lacks}`, remedy: 'Give both, or leave both empty' };
}

/** What is said of a latitude or longitude that is none. */
export function outside(what: 'latitude' | 'longitude', value: string): RowProblem {
  const most = what === 'latitude' ? 90 : 180;
  return {
    value,
    reason: `the ${what} is not a number from −${most} to ${most}`,
    remedy: 'Give degrees as 47.25 or 47°15′00″N (WGS 84), south and west negative or by their letters',
  };
}

function areaOf(written: string, unit: string, { areaFactor, comma }: RowFormat): Fact<number | null> {
  const area = parseFigure(written, comma);
  if (area === null) return null;
  if (!(area > 0)) {
    return {
      value: written,
      reason: Number.isNaN(area) ? 'the drainage area is not a number' : 'a drainage area must be more than 0',
      remedy: 'Correct it, or leave it empty where there is none or nobody knows',
    };
  }
  const factor = areaFactor ?? areaFactorOf(unit);
  if (factor === null)
    return { value: unit, reason: 'the unit of the area is not known', remedy: 'Write km2, mi2, ha, acres or m2' };
  // Takes the binary tail off a converted area: 15 significant digits.
  const areaKm2 = Number((area * factor).toPrecision(15));
  if (areaKm2 <= LARGEST_KM2) return areaKm2;
  return {
    value: written,
    reason: `a drainage area of ${Math.round(areaKm2)} km² is larger than that of any river`,
    remedy: 'Correct it, or the unit that the file names: km², mi², ha, acres or m²',
  };
}

type History = Pick<RegistryStation, 'changes' | 'namedFlows' | 'notes' | 'derived'>;

/** What a registry says of a station beyond its facts; only what it has columns for. */
function historyOf(text: (column: number) => string, columns: RegistryColumns, { comma }: RowFormat): Fact<History> {
  const history: History = {};
  if (columns.notes >= 0) history.notes = text(columns.notes);
  if (columns.changes >= 0) {
    const changes = changesOf(text(columns.changes));
    if (isProblem(changes)) return changes;
    history.changes = changes;
  }
  if (columns.namedFlows >= 0 || columns.flows.length > 0) {
    const listed = fromJson('namedFlows', text(columns.namedFlows), 'named flows');
    if (isProblem(listed)) return listed;
    const flows = namedFlowsOf(text, columns.flows, comma);
    if (isProblem(flows)) return flows;
    history.namedFlows = [...(listed ?? []), ...flows];
  }
  if (columns.derived >= 0) {
    const derived = fromJson('derived', text(columns.derived), 'recipe of a derived record');
    if (isProblem(derived)) return derived;
    history.derived = derived ?? null;
  }
  return history;
}

function changesOf(written: string): Fact<NonNullable<RegistryStation['changes']>> {
  if (written.startsWith('[')) {
    const changes = fromJson('changes', written, 'dated changes');
    return isProblem(changes) ? changes : (changes ?? []);
  }
  const changes = parseChanges(isNothing(written) ? '' : written);
  if (typeof changes !== 'string') return changes;
  return {
    value: changes,
    reason: 'a change has no date',
    remedy: 'Write changes as “2001-05-01 dam: note; 2010-09-30 gauge moved”',
  };
}

function fromJson<Key extends keyof typeof HISTORY_JSON>(
  key: Key,
  written: string,
  what: string,
): Fact<ReturnType<(typeof HISTORY_JSON)[Key]['parse']> | null> {
  if (isNothing(written)) return null;
  const result = HISTORY_JSON[key].safeParse(parseJsonField(written));
  if (result.success) return result.data as ReturnType<(typeof HISTORY_JSON)[Key]['parse']>;
  const at = result.error.issues[0]?.path.join('.') ?? '';
  const reason = `the ${what} cannot be read${at === '' ? '' : ` at ${at}`}`;
  return {
    value: written.slice(0, 100),
    reason,
    remedy: 'Write JSON as an exported region has it, or leave the field empty',
  };
}
