import { pairMetadata, pairProduct } from '../../export/pair-product.ts';
import { pairOf } from '../../jobs/pair.ts';
import { listStations } from '../../store/stations.ts';
import { ANALYSIS_HELP, ANALYSIS_OPTIONS, analysisRequest, deliver, provenance, withWorkers } from '../analysis.ts';
import { readArguments } from '../arguments.ts';
import { UsageError } from '../usage-error.ts';

export const usage = `Usage: npx hungerstone pair --region NAME --station CODE [--with CODE]... [options]

One station against a reference, year by year over the years that all have: the ratio of their annual figures, the sums
of the double-mass curve; in JSON and beside the CSV file also the trends. stderr says what it came to.

  --with CODE      a reference station; given several times, their mean is the reference. Left out: the three natural
                   stations whose annual figures go most with the station's
${ANALYSIS_HELP}`;

export async function run(argv: string[]): Promise<number> {
  const { values } = readArguments(argv, { ...ANALYSIS_OPTIONS, with: { type: 'string', multiple: true } });
  const [code, ...others] = values.station ?? [];
  if (code === undefined || others.length > 0) throw new UsageError('Name one station with --station CODE.');
  return withWorkers(async () => {
    const request = await analysisRequest(values);
    const { region, basis, format } = request;
    const answer = await pairOf(region, basis, code, values.with ?? null);
    if (!answer) throw new Error(`${region.name} has no station "${code}".`);
    const { comparison } = answer;
    if (comparison.problem !== null) throw new Error(comparison.problem);
    const from = await provenance(region, answer.basis, comparison.warnings);
    const part = new Set([comparison.station, ...comparison.references].map((each) => each.code));
    const stations = (await listStations(region.id)).filter((station) => part.has(station.code));
    await deliver(request, pairProduct(format, comparison, from, stations), (file) =>
      pairMetadata(file, comparison, from),
    );
    for (const line of [comparison.sentence, ...comparison.warnings]) process.stderr.write(`${line}\n`);
    return 0;
  });
}
