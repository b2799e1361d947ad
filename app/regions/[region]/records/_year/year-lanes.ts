import { parseIsoDate } from '@/lib/calendar/day';
import { FINDING_KINDS, type FindingKind, SUSPECT_KINDS } from '@/lib/checks/finding';
import type { FindingRow, MarkView } from '@/lib/jobs/records-types';
import { DAY_FLAGS, type DayColumns, hasFlag, stretchesOf } from './days-answer.ts';
import type { Lane } from './draw-days.ts';

/** Names of findings that fit beside a lane. */
const SHORT: Record<FindingKind, string> = {
  negative: 'negative',
  repeated: 'repeated',
  jump: 'jump',
  flat: 'flat run',
  step: 'step in mean',
  'unit-change': 'unit change',
  future: 'future date',
  'too-large': 'too large',
};

const spanOf = ({ first, last }: { first: string; last: string }): [number, number] => [
  parseIsoDate(first),
  parseIsoDate(last),
];

/** A lane for each flag that a day of the stretch has, each kind of finding and each acceptance or note that touches it.
 *  Rejections have theirs by the flag. */
export function lanesOf(columns: DayColumns, findings: readonly FindingRow[], marks: readonly MarkView[]): Lane[] {
  const { first, flags } = columns;
  const last = first + flags.length - 1;
  const touching = (spans: [number, number][]) => spans.filter(([from, to]) => from <= last && to >= first);
  const ofFlags = DAY_FLAGS.map(({ name, words }): Lane => {
    const look = name === 'suspect' ? 'alert' : name === 'rejected' ? 'crossed' : 'plain';
    return { label: words, look, stretches: stretchesOf(first, flags.length, (at) => hasFlag(flags[at], name)) };
  });
  const ofFindings = FINDING_KINDS.map((kind): Lane => {
    const spans = findings.filter((finding) => finding.kind === kind).map(spanOf);
    return { label: SHORT[kind], look: SUSPECT_KINDS.includes(kind) ? 'alert' : 'open', stretches: touching(spans) };
  });
  const ofMarks = (['accept', 'note'] as const).map((kind): Lane => {
    const spans = marks.filter((mark) => mark.kind === kind).map(spanOf);
    return { label: kind === 'accept' ? 'accepted' : 'noted', look: 'open', stretches: touching(spans) };
  });
  return [...ofFlags, ...ofFindings, ...ofMarks].filter(({ stretches }) => stretches.length > 0);
}

/** Findings or marks that touch the days first to last. */
export function inYear<Row extends { first: string; last: string }>(
  rows: readonly Row[],
  first: number,
  last: number,
): Row[] {
  return rows.filter((row) => {
    const [from, to] = spanOf(row);
    return from <= last && to >= first;
  });
}
