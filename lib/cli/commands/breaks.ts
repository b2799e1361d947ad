import { breaksMetadata, regionBreaksProduct } from '../../export/breaks-product.ts';
import { regionBreaksOf } from '../../jobs/breaks.ts';
import { BREAK_CHOICE_HELP, parseBreakChoice } from '../../region/break-choice.ts';
import { ANALYSIS_HELP, ANALYSIS_OPTIONS, analysisRequest, deliver, provenance, withWorkers } from '../analysis.ts';
import { plainFormat, readArguments } from '../arguments.ts';
import { UsageError } from '../usage-error.ts';

export const usage = `Usage: npx hungerstone breaks --region NAME [--breaks LIST] [options]

Before and after: levels between breaks at every ranked station that has one, the difference with its interval, and a
rank-sum test corrected for serial correlation. Adjusted p is over all steps of the region, whatever --station narrows to.
stderr says how many stations are lower and higher after each.

  --breaks LIST    ${BREAK_CHOICE_HELP};
                   changes by default
${ANALYSIS_HELP}  --format geojson is refused: a station may have several rows
`;

export async function run(argv: string[]): Promise<number> {
  const { values } = readArguments(argv, { ...ANALYSIS_OPTIONS, breaks: { type: 'string', default: 'changes' } });
  const format = plainFormat(values.format);
  const choice = parseBreakChoice(values.breaks);
  if (!choice) throw new UsageError(`--breaks takes ${BREAK_CHOICE_HELP}; not "${values.breaks}".`);
  return withWorkers(async () => {
    const request = await analysisRequest(values);
    const { region, narrowing } = request;
    const { breaks, basis } = await regionBreaksOf(region, request.basis, choice);
    const from = await provenance(region, basis);
    const named = narrowing.codes && new Set(narrowing.codes);
    const stations = breaks.stations.filter(({ code }) => !named || named.has(code));
    await deliver(request, regionBreaksProduct(format, { ...breaks, stations }, from), (file) =>
      breaksMetadata(from, file),
    );
    if (breaks.stations.length === 0) process.stderr.write('No ranked station has such a break.\n');
    for (const { label, tested, lower, higher } of breaks.summary) {
      process.stderr.write(`${label}: of ${tested} steps tested ${lower} lower and ${higher} higher after\n`);
    }
    return 0;
  });
}
