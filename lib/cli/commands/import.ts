import { existsSync } from 'node:fs';
import { basename, resolve } from 'node:path';
import { launchImport } from '../../jobs/import-job.ts';
import type { FileKind, GivenFile, ImportChoices, ImportOutcome } from '../../jobs/import-types.ts';
import { CancelledError, cancelJob, FailedWithResult } from '../../jobs/live-jobs.ts';
import { getRegion, slugOf } from '../../store/regions.ts';
import { withWorkers } from '../analysis.ts';
import { readArguments } from '../arguments.ts';
import { CHOICE_OPTIONS, CHOICE_USAGE, choicesOf } from '../import-choices.ts';
import { followImport } from '../import-progress.ts';
import { reportJson, reportText, revisionLines } from '../import-report.ts';
import { untilInterrupted } from '../interrupt.ts';
import { UsageError } from '../usage-error.ts';

export const usage = `Usage: npx hungerstone import --region NAME [options] FLOWFILE...

Takes in a station registry, map layers and daily flows: all of the files or none. Makes the region if it is new. Flow
files are text tables, Excel workbooks or WaterML; their layout, dates, unit and stations are recognised from what they
hold. Archives (.zip, .gz) are unpacked.

  --region NAME     the region
  --stations FILE   a station registry: CSV, workbook or GeoJSON points; may be given several times
  --layer FILE      a map layer, GeoJSON; may be given several times
${CHOICE_USAGE}
  --json            the report as JSON

Exit codes: 0 done, 1 failed and nothing changed, 2 wrong usage, 3 taken in, with rejected rows.
`;

const OPTIONS = {
  region: { type: 'string' },
  stations: { type: 'string', multiple: true },
  layer: { type: 'string', multiple: true },
  ...CHOICE_OPTIONS,
  json: { type: 'boolean', default: false },
} as const;

/** Exit codes beside 0. */
const FAILED = 1;
const WITH_REJECTED_ROWS = 3;

export async function run(argv: string[]): Promise<number> {
  const { values, positionals } = readArguments(argv, OPTIONS, { name: 'FLOWFILE' });
  const { region } = values;
  if (region === undefined || region.trim() === '') throw new UsageError('Name the region with --region NAME.');
  const files = [
    ...given(values.stations ?? [], 'registry'),
    ...given(values.layer ?? [], 'layer'),
    ...given(positionals, 'flows'),
  ];
  if (files.length === 0) throw new UsageError('Give at least one FLOWFILE, --stations FILE or --layer FILE.');
  const choices = choicesOf(values);
  return withWorkers(async () => {
    try {
      const outcome = await imported(region, files, choices);
      process.stdout.write(values.json ? reportJson(outcome) : reportText(outcome));
      const rejected = outcome.taken.some(({ report }) => (report?.rejectedTotal ?? 0) > 0);
      return rejected ? WITH_REJECTED_ROWS : 0;
    } catch (error) {
      if (error instanceof CancelledError) process.stderr.write('Cancelled; nothing was changed.\n');
      else if (error instanceof FailedWithResult) sayProblems(error.result as ImportOutcome);
      else throw error;
      return FAILED;
    }
  });
}

function given(paths: readonly string[], kind: FileKind): GivenFile[] {
  return paths.map((path) => {
    if (!existsSync(path)) throw new Error(`There is no file ${path}.`);
    return { path: resolve(path), name: basename(path), kind };
  });
}

async function imported(name: string, files: GivenFile[], choices: ImportChoices): Promise<ImportOutcome> {
  const standing = await getRegion(slugOf(name));
  const region = standing ? { id: standing.id } : { name };
  const { id, result } = await launchImport({ region, files, choices });
  const over = new AbortController();
  const telling = followImport(id, over.signal);
  const cancel = () => void cancelJob(id);
  return untilInterrupted(cancel, async () => {
    try {
      return await result;
    } finally {
      over.abort();
      await telling;
    }
  });
}

function sayProblems({ problems }: ImportOutcome): void {
  for (const { message, revisions } of problems) {
    process.stderr.write(`${[message, ...(revisions ? revisionLines(revisions) : [])].join('\n')}\n`);
  }
  process.stderr.write('Nothing was changed.\n');
}
