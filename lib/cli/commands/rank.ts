import { narrowTo } from '../../export/narrow.ts';
import { rankingMetadata } from '../../export/ranking-metadata.ts';
import { rankingProduct } from '../../export/ranking-product.ts';
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

export const usage = `Usage: npx hungerstone rank --region NAME [options]

The stations in order of trend in their annual minima, most strongly declining first. Stations without a place follow
with the reason; stderr names them too.

${ANALYSIS_HELP}`;

export async function run(argv: string[]): Promise<number> {
  const { values } = readArguments(argv, ANALYSIS_OPTIONS);
  return withWorkers(async () => {
    const request = await analysisRequest(values);
    const { region, basis, format, narrowing } = request;
    const { ranking } = await rankingOf(region, basis);
    const from = await provenance(region, ranking.basis, ranking.warnings);
    await deliver(request, rankingProduct(format, ranking, from, narrowing), (file) => rankingMetadata(from, file));
    for (const warning of ranking.warnings) process.stderr.write(`${warning}\n`);
    const unranked = narrowTo(ranking.rows, narrowing, (row) => row).filter(({ rank }) => rank === null);
    sayLeftOut(
      'Not ranked',
      unranked.map(({ code, name, unrankedReason }) => ({ code, name, reason: unrankedReason ?? 'no trend' })),
    );
    return 0;
  });
}
