import { MINIMA_COLUMNS } from '../../export/minima-csv.ts';
import { minimaProduct } from '../../export/minima-product.ts';
import { narrowTo } from '../../export/narrow.ts';
import { tableMetadata } from '../../export/table-metadata.ts';
import { minimaOf } from '../../jobs/minima.ts';
import { rankingOf } from '../../jobs/ranking.ts';
import {
  ANALYSIS_HELP,
  ANALYSIS_OPTIONS,
  analysisRequest,
  deliver,
  provenance,
  sayLeftOut,
  withWorkers,
} from '../analysis.ts';
import { readArguments } from '../arguments.ts';

export const usage = `Usage: npx hungerstone minima --region NAME [options]

The annual minima of every station, one row a low-flow year, those that are not usable with the reason.

${ANALYSIS_HELP}`;

export async function run(argv: string[]): Promise<number> {
  const { values } = readArguments(argv, ANALYSIS_OPTIONS);
  return withWorkers(async () => {
    const request = await analysisRequest(values);
    const { region, basis, format, narrowing } = request;
    const { stations } = await minimaOf(region, basis);
    const { ranking } = await rankingOf(region, basis);
    const from = await provenance(region, ranking.basis);
    await deliver(request, minimaProduct(format, stations, from, narrowing), (file) =>
      tableMetadata(file, `${region.name}: annual low-flow minima`, MINIMA_COLUMNS, from),
    );
    const empty = narrowTo(stations, narrowing, ({ station }) => station).filter(
      ({ minima }) => minima.years.length === 0,
    );
    sayLeftOut(
      'No minima',
      empty.map(({ station: { code, name } }) => ({ code, name, reason: 'no flows' })),
    );
    return 0;
  });
}
