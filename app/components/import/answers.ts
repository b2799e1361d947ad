/** What a person answers about files that could not be taken as they are, and how that becomes the import's choices. */

import type { FieldPlace, FlowUnit, Mapping } from '@/lib/intake/types';
import type { FileChoices, ImportChoices, ImportProblem } from '@/lib/jobs/import-types';

export interface Answer {
  unit?: FlowUnit;
  station?: string;
  dateOrder?: Mapping['date']['order'];
  value?: FieldPlace;
  revise?: boolean;
  /** leave the file out of the next try */
  leaveOut?: boolean;
}

export type Answers = Record<string, Answer>;

/** Whether a file whose column of flows is asked for does not tell its unit either. */
export const asksUnit = ({ inspection }: ImportProblem): boolean => inspection?.mapping?.unit === null;

const ASKED = ['unit', 'station', 'date-order', 'mapping', 'revise'] as const;

/** Whether an answer on the screen would do. A missing area has to come in a station list. */
export const isAsked = ({ problem }: ImportProblem): boolean =>
  problem?.needs !== undefined && ASKED.some((need) => need === problem.needs);

/** Whether a problem has been answered, so that trying again makes sense. */
export function isAnswered(problem: ImportProblem, answer: Answer | undefined): boolean {
  if (answer?.leaveOut) return true;
  switch (problem.problem?.needs) {
    case 'unit':
      return answer?.unit !== undefined;
    case 'station':
      return Boolean(answer?.station?.trim());
    case 'date-order':
      return answer?.dateOrder !== undefined;
    case 'mapping':
      return answer?.value !== undefined && (answer.unit !== undefined || !asksUnit(problem));
    case 'revise':
      return answer?.revise === true;
    default:
      return false;
  }
}

/** The other files that ask the same and are laid out the same: nineteen files of one agency need one answer. */
export function alikeTo(problem: ImportProblem, problems: readonly ImportProblem[]): ImportProblem[] {
  const needs = problem.problem?.needs;
  if (needs !== 'unit' && needs !== 'mapping' && needs !== 'date-order') return [];
  const layout = problem.inspection?.mapping?.layout;
  return problems.filter(
    (other) => other !== problem && other.problem?.needs === needs && other.inspection?.mapping?.layout === layout,
  );
}

/** Lays an answer in; files that are alike and have said nothing of their own take it as well. */
export function answeredAlike(
  answers: Answers,
  problems: readonly ImportProblem[],
  problem: ImportProblem,
  given: Answer,
): Answers {
  const before = answers[problem.file];
  const out: Answers = { ...answers, [problem.file]: given };
  for (const key of ['unit', 'dateOrder', 'value'] as const) {
    if (given[key] === before?.[key]) continue;
    for (const { file, inspection } of alikeTo(problem, problems)) {
      const theirs = out[file]?.[key];
      if (theirs !== undefined && !same(theirs, before?.[key])) continue;
      // a column is only the same column where the file has it
      const known = key !== 'value' || inspection?.valueCandidates.some(({ place }) => same(place, given.value));
      if (known) out[file] = { ...out[file], [key]: given[key] };
    }
  }
  return out;
}

const same = (a: unknown, b: unknown): boolean => JSON.stringify(a) === JSON.stringify(b);

/** The choices of the next try: what was chosen before, with the answers laid over it.
 *  Answers of earlier tries stay, so that a file that asked for its unit and then for its station keeps both. */
export function withAnswers(
  choices: ImportChoices,
  problems: readonly ImportProblem[],
  answers: Answers,
): ImportChoices {
  const files: Record<string, FileChoices> = { ...choices.files };
  for (const problem of problems) {
    const answer = answers[problem.file];
    if (!answer || answer.leaveOut) continue;
    const before = files[problem.file] ?? {};
    const mapping = answeredMapping(before.mapping, problem, answer);
    files[problem.file] = {
      ...before,
      ...(answer.unit === undefined ? {} : { unit: answer.unit }),
      ...(answer.station === undefined ? {} : { station: answer.station.trim() }),
      ...(mapping === undefined ? {} : { mapping }),
    };
  }
  const revise = choices.revise || problems.some((problem) => answers[problem.file]?.revise);
  return { ...choices, files, ...(revise ? { revise } : {}) };
}

function answeredMapping(
  before: Partial<Mapping> | undefined,
  { inspection }: ImportProblem,
  { value, dateOrder }: Answer,
): Partial<Mapping> | undefined {
  const recognised = inspection?.mapping ?? null;
  if (value === undefined && dateOrder === undefined) return before;
  const date = before?.date ?? recognised?.date;
  return {
    ...before,
    ...(value === undefined ? {} : { value, ...(recognised ? { layout: recognised.layout } : {}) }),
    ...(dateOrder === undefined || !date ? {} : { date: { ...date, order: dateOrder } }),
  };
}
