import { longAnswer } from '@/app/api/_http/long-answer';
import { basisOf, narrowingOf, readParameters } from '@/app/api/_http/parameters';
import { provenanceOf, regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { tableAnswer } from '@/app/api/_http/table';
import { rankingMetadata } from '@/lib/export/ranking-metadata';
import { rankingProduct } from '@/lib/export/ranking-product';
import { certaintyKey, certaintyOf } from '@/lib/jobs/certainty';
import { rankingOf } from '@/lib/jobs/ranking';
import { type SureRanking, withCertainty } from '@/lib/region/sure-rows';
import { rankingParameters } from './parameters';

/** The stations in order of trend in annual minima, with how sure each place is. */
export const GET = route<{ region: string }>(async (request, params) => {
  const { format, spans, k, ...narrow } = readParameters(request, rankingParameters, { withBasis: true });
  const region = await regionOf(params);
  const ranked = await rankingOf(region, basisOf(request, region));
  const { ranking, key } = ranked;
  const from = await provenanceOf(region, ranking.basis, ranking.warnings);
  const narrowing = narrowingOf(narrow);
  const file = `${region.slug}-ranking.csv`;
  const answer = (sure: SureRanking) =>
    tableAnswer(request, {
      key,
      format,
      narrowing,
      file,
      product: (as) => rankingProduct(as, sure, from, narrowing),
      metadata: () => rankingMetadata(from, file),
    });
  if (spans === 'none' || format === 'metadata') return answer(ranking);
  return longAnswer(
    {
      kind: 'certainty',
      regionId: region.id,
      key: certaintyKey(key),
      stations: ranking.counts.ranked + ranking.counts.drying,
      // a table is wanted whole: there is no other answer that a program could begin with
      wait: true,
      compute: (context) => certaintyOf(ranked, context),
    },
    (certainty) => answer(withCertainty(ranking, certainty, k)),
  );
});
