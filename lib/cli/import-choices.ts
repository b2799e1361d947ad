import { basename } from 'node:path';
import * as z from 'zod';
import { parseMapping } from '../intake/mapping.ts';
import { CORRECTIONS, IntakeError, type Mapping } from '../intake/types.ts';
import { fileChoices } from '../jobs/file-choices.ts';
import type { FileChoices, ImportChoices } from '../jobs/import-types.ts';
import { AREA_UNITS } from '../series/area-units.ts';
import { UNITS } from '../series/quantities.ts';
import { OVERLAP_RULES } from '../store/lay-parts.ts';
import { readJson } from './analysis.ts';
import { UsageError } from './usage-error.ts';

/** The options of the import command that say how files are to be read and stored. */
export const CHOICE_OPTIONS = {
  unit: { type: 'string' },
  station: { type: 'string' },
  mapping: { type: 'string' },
  choices: { type: 'string' },
  'daily-mean': { type: 'string' },
  'match-codes': { type: 'boolean', default: false },
  correct: { type: 'string', multiple: true },
  'area-unit': { type: 'string' },
  rule: { type: 'string' },
  revise: { type: 'boolean', default: false },
  'dry-run': { type: 'boolean', default: false },
  by: { type: 'string' },
} as const;

export const CHOICE_USAGE = `  --unit UNIT       unit of the values: ${UNITS.join(', ')}
                    (mm/d over the drainage area)
  --station CODE    the station of flow files that name none; else the file's name tells
  --mapping FILE    JSON that says how the flow files are to be read
  --choices FILE    JSON of choices for single files, by name: {"a.csv": {"unit": "L/s", "station": "17"}}
  --daily-mean SHARE  take the mean of several values a day, where at least this share of the day (0 to 1) is covered
  --match-codes     take codes that differ from the registry's by case or leading zeros for the registry's
  --correct WHAT    correct the registry's coordinates: ${CORRECTIONS.join(', ')}; may be given several times
  --area-unit UNIT  unit of a registry's areas where it names none: ${AREA_UNITS.join(', ')}
  --rule RULE       what becomes of values unlike those that stand: ${OVERLAP_RULES.join(', ')};
                    without it such a file is refused, and says what it would change
  --revise          the same as --rule take-new
  --dry-run         read, check and compare; change nothing, and say what would come of it
  --by NAME         who imports, for the list of imports`;

interface ChoiceValues {
  unit?: string;
  station?: string;
  mapping?: string;
  choices?: string;
  'daily-mean'?: string;
  'match-codes': boolean;
  correct?: string[];
  'area-unit'?: string;
  rule?: string;
  revise: boolean;
  'dry-run': boolean;
  by?: string;
}

/** What a person says by the options of the import command.
 *  @throws UsageError naming the option and what would do */
export function choicesOf(values: ChoiceValues): ImportChoices {
  const rule = values.rule === undefined ? undefined : oneOf('--rule', values.rule, OVERLAP_RULES);
  if (values.revise && rule !== undefined && rule !== 'take-new') {
    throw new UsageError(`--revise is --rule take-new; give one of --revise and --rule ${rule}.`);
  }
  const mapping = mappingOf(values);
  const all: FileChoices = {
    ...(mapping && { mapping }),
    ...(values.unit !== undefined && { unit: oneOf('--unit', values.unit, UNITS) }),
    ...(values.station !== undefined && { station: values.station }),
    ...(values['match-codes'] && { matchCodes: true }),
    ...(values['area-unit'] !== undefined && { areaUnit: oneOf('--area-unit', values['area-unit'], AREA_UNITS) }),
    ...(values.correct && { corrections: values.correct.map((what) => oneOf('--correct', what, CORRECTIONS)) }),
  };
  return {
    all,
    ...(values.choices !== undefined && { files: fileChoicesIn(values.choices) }),
    ...(rule && { rule }),
    ...{ revise: values.revise, dryRun: values['dry-run'], by: values.by ?? 'import command' },
  };
}

function oneOf<T extends string>(option: string, text: string, words: readonly T[]): T {
  const known = words.find((word) => word === text);
  if (!known) throw new UsageError(`${option} takes ${words.join(', ')}, not "${text}".`);
  return known;
}

function mappingOf(values: ChoiceValues): Partial<Mapping> | undefined {
  const path = values.mapping;
  const given =
    path === undefined ? undefined : checked(() => parseMapping(readJson('--mapping', path), basename(path)));
  const share = values['daily-mean'];
  if (share === undefined) return given;
  const dailyMean = Number(share);
  if (share.trim() === '' || !(dailyMean >= 0 && dailyMean <= 1)) {
    throw new UsageError(`--daily-mean takes a share from 0 to 1, not "${share}".`);
  }
  return { ...given, dailyMean };
}

function checked<T>(parse: () => T): T {
  try {
    return parse();
  } catch (error) {
    if (error instanceof IntakeError) throw new UsageError(error.message, { cause: error });
    throw error;
  }
}

function fileChoicesIn(path: string): Record<string, FileChoices> {
  const result = z.record(z.string(), fileChoices).safeParse(readJson('--choices', path));
  if (!result.success) {
    const [{ path: place, message }] = result.error.issues;
    throw new UsageError(`${path}: ${place.length > 0 ? `"${place.join('.')}": ` : ''}${message}.`);
  }
  const files = Object.entries(result.data).map(([name, { mapping, ...choices }]): [string, FileChoices] => [
    name,
    { ...choices, ...(mapping && { mapping: checked(() => parseMapping(mapping, `${basename(path)}, ${name}`)) }) },
  ]);
  return Object.fromEntries(files);
}
