import { regionalMetadata, regionalProduct } from '../../export/regional-product.ts';
import { rankingOf } from '../../jobs/ranking.ts';
import { regionalOf } from '../../jobs/regional.ts';
import { areaFromText } from '../../region/in-polygon.ts';
import { CHANCE_METHODS } from '../../region/regional-types.ts';
import { ANALYSIS_HELP, ANALYSIS_OPTIONS, analysisRequest, deliver, provenance, withWorkers } from '../analysis.ts';
import { plainFormat, readArguments } from '../arguments.ts';
import { UsageError } from '../usage-error.ts';
import { workProgress } from '../work-progress.ts';

export const usage = `Usage: npx hungerstone regional --region NAME [options]

What the ranked stations say together: how many fall and rise beyond chance, and whether they share one trend; for all of
them, by influence and in an area, each with every station and with those that share no water. stderr says it in words.

  --chance METHOD  how chance is imitated: permutation (default) puts the years in random order, sieve draws them anew
                   with their carry-over
  --area CORNERS   longitude,latitude in degrees with ; between: --area='7,50;8,50;8,51'. The stations inside are one
                   group more
${ANALYSIS_HELP}  --format geojson is refused: groups of stations are no places
`;

const OPTIONS = {
  ...ANALYSIS_OPTIONS,
  chance: { type: 'string', default: 'permutation' },
  area: { type: 'string' },
} as const;

export async function run(argv: string[]): Promise<number> {
  const { values } = readArguments(argv, OPTIONS);
  const format = plainFormat(values.format);
  const method = CHANCE_METHODS.find((known) => known === values.chance);
  if (!method) throw new UsageError(`--chance takes ${CHANCE_METHODS.join(' or ')}, not "${values.chance}".`);
  if (values.station) throw new UsageError('regional speaks of stations together: take --area in place of --station.');
  const read = values.area === undefined ? { area: null } : areaFromText(values.area);
  if ('problem' in read) throw new UsageError(`--area: ${read.problem}.`);
  return withWorkers(async () => {
    const request = await analysisRequest(values);
    const { region, basis } = request;
    const progress = workProgress({ flows: 'Comparing flows', chance: 'Trying chance' });
    const { ranking } = await rankingOf(region, basis);
    const answers = await regionalOf(region, basis, { method, area: read.area }, progress.context);
    progress.end();
    const from = await provenance(region, ranking.basis, ranking.warnings);
    await deliver(request, regionalProduct(format, answers, from), (file) => regionalMetadata(from, file));
    const [all] = answers.groups;
    const { chance, kendall, discoveries } = all.sentences;
    const said = [chance, kendall, discoveries, answers.drying?.sentence];
    for (const line of new Set([...ranking.warnings, ...said])) if (line) process.stderr.write(`${line}\n`);
    return 0;
  });
}
