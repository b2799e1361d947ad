import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { expect } from 'vitest';
import { isoDate, parseIsoDate } from '../../../lib/calendar/day.ts';
import { inspectFile } from '../../../lib/intake/inspect-file.ts';
import { readFlows } from '../../../lib/intake/read-flows.ts';
import {
  type ImportReport,
  type Inspection,
  type InspectOptions,
  IntakeError,
  type ReadFlowsOptions,
  type RejectedRow,
  type StagedPart,
} from '../../../lib/intake/types.ts';
import { NO_ROW } from '../../../lib/series/day-codes.ts';

type Given = Partial<Omit<ReadFlowsOptions, 'emit'>>;

/** Runs `use` with a file of the given content that is gone afterwards. */
export async function withFile<T>(content: string | Uint8Array, use: (path: string) => Promise<T>): Promise<T> {
  const folder = mkdtempSync(join(tmpdir(), 'hungerstone-intake-'));
  const path = join(folder, 'file');
  writeFileSync(path, content);
  try {
    return await use(path);
  } finally {
    rmSync(folder, { recursive: true });
  }
}

export interface ReadResult {
  report: ImportReport;
  parts: StagedPart[];
  rejected: RejectedRow[];
  /** ISO date → [value, code text] of the first station */
  days: Record<string, [number, string]>;
}

/** Reads flows from text; the file is called `gauge.csv` unless the options say otherwise. */
export function read(content: string | Uint8Array, options: Given = {}): Promise<ReadResult> {
  return withFile(content, async (path) => {
    const parts: StagedPart[] = [];
    const rejected: RejectedRow[] = [];
    const report = await readFlows(path, {
      fileName: 'gauge.csv',
      onRejected: (row) => rejected.push(row),
      ...options,
      emit: (part) => parts.push(part),
    });
    return { report, parts, rejected, days: parts.length > 0 ? daysOf(parts[0]) : {} };
  });
}

/** What inspecting a file of the given content says; it is called `gauge.csv` unless the options say otherwise. */
export function inspect(content: string | Uint8Array, options: Partial<InspectOptions> = {}): Promise<Inspection> {
  return withFile(content, (path) => inspectFile(path, { fileName: 'gauge.csv', ...options }));
}

/** The days of a part that the file had rows for. */
export function daysOf(part: StagedPart): Record<string, [number, string]> {
  const days: Record<string, [number, string]> = {};
  for (const [at, code] of part.codes.entries()) {
    if (code !== NO_ROW) days[isoDate(part.firstDay + at)] = [part.values[at], part.codeList[code].text];
  }
  return days;
}

/** The IntakeError that reading ends in.
 *  @throws when it ends well, or in another error */
export async function refusal(content: string | Uint8Array, options: Given = {}): Promise<IntakeError> {
  const outcome = await read(content, options).catch((error: unknown) => error);
  if (!(outcome instanceof IntakeError))
    throw new Error(`expected an IntakeError, got ${String(outcome)}`, { cause: outcome });
  return outcome;
}

/** Consecutive ISO dates. */
export function dates(first: string, count: number): string[] {
  const day = parseIsoDate(first);
  return Array.from({ length: count }, (_, at) => isoDate(day + at));
}

/** Every refusal must name the file, say what is wrong and what to do. */
export function expectSaysAll(error: IntakeError): void {
  expect(error.message).toContain('gauge.csv');
  expect(error.problem.message.length).toBeGreaterThan(10);
  expect(error.problem.remedy.length).toBeGreaterThan(10);
  expect(error.message).not.toContain('/tmp');
}
