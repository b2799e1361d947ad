import { narrowTo } from '../../export/narrow.ts';
import { rankingMetadata } from '../../export/ranking-metadata.ts';
import { rankingProduct } from '../../export/ranking-product.ts';
import { certaintyOf } from '../../jobs/certainty.ts';
import { rankingOf } from '../../jobs/ranking.ts';
import { MOST_STEEPEST, USUAL_STEEPEST } from '../../region/certainty-types.ts';
import type { Ranking } from '../../region/ranking-types.ts';
import { type SureRanking, withCertainty } from '../../region/sure-rows.ts';
import {
  ANALYSIS_HELP,
  ANALYSIS_OPTIONS,
  analysisRequest,
  deliver,
  provenance,
  sayLeftOut,
  withWorkers,
} from '../analysis.ts';
import { readArguments, wholeNumber } from '../arguments.ts';
import { workProgress } from '../work-progress.ts';

export const usage = `Usage: npx hungerstone rank --region NAME [options]

The stations in order of trend in their annual minima, or in the index that the basis names, most strongly declining
first. Stations without a place follow with the reason; stderr names them too. With each place goes its 90 % span, the
probability of being among the k steepest declines, and the trend that the record could have shown: all by simulation,
the same for the same data and basis.

${ANALYSIS_HELP}  --steepest K     the k of "among the k steepest declines", 1–${MOST_STEEPEST}; ${USUAL_STEEPEST} by default
  --no-spans       leave all that out: quicker in a large region
`;

const OPTIONS = {
  ...ANALYSIS_OPTIONS,
  steepest: { type: 'string', default: String(USUAL_STEEPEST) },
  'no-spans': { type: 'boolean', default: false },
} as const;

export async function run(argv: string[]): Promise<number> {
  const { values } = readArguments(argv, OPTIONS);
  const k = wholeNumber('--steepest', values.steepest, 1, MOST_STEEPEST);
  return withWorkers(async () => {
    const request = await analysisRequest(values);
    const { region, basis, format, narrowing } = request;
    const ranked = await rankingOf(region, basis);
    const ranking = values['no-spans'] ? ranked.ranking : await withSpans(ranked, k);
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

async function withSpans(ranked: { ranking: Ranking; key: string }, k: number): Promise<SureRanking> {
  const progress = workProgress({ certainty: 'Simulating how sure each place is' });
  const certainty = await certaintyOf(ranked, progress.context).finally(progress.end);
  return withCertainty(ranked.ranking, certainty, k);
}
