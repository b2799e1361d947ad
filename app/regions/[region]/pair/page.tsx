import type { Metadata } from 'next';
import { BasisSentence } from '@/app/components/basis-sentence';
import { Header } from '@/app/components/header';
import { ErrorNote } from '@/app/components/notes';
import { rankingOf } from '@/lib/jobs/ranking';
import { type PageQuery, pageRequest } from '../page-request';
import { pairAnswers } from './pair-answers';
import { PairScreen } from './pair-screen';
import { readPairView } from './pair-view';

export const metadata: Metadata = { title: 'Against a reference' };

interface Props {
  params: Promise<{ region: string }>;
  searchParams: Promise<PageQuery>;
}

/** A station against reference stations, and against the weather: is it the weather, or is it the river? */
export default async function PairPage({ params, searchParams }: Props) {
  const { region, basis, basisProblem, query } = await pageRequest((await params).region, await searchParams);
  const view = readPairView(query);
  const { ranking } = await rankingOf(region, basis);
  const answers = await pairAnswers(region, basis, view, ranking.rows);
  return (
    <>
      <Header region={region} />
      <main id="main">
        <BasisSentence resolved={ranking.basis} base={region.basis}>
          {basisProblem && <ErrorNote title="The region’s own terms are shown">{basisProblem}</ErrorNote>}
        </BasisSentence>
        <PairScreen region={region} basis={ranking.basis} answers={answers} rows={ranking.rows} query={query} />
      </main>
    </>
  );
}
