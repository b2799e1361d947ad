import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { BasisSentence } from '@/app/components/basis-sentence';
import { Header } from '@/app/components/header';
import { ErrorNote } from '@/app/components/notes';
import { basisToQuery } from '@/lib/basis';
import { rankingOf } from '@/lib/jobs/ranking';
import { stationDetail } from '@/lib/jobs/station';
import { getStation } from '@/lib/store/stations';
import { type PageQuery, pageRequest } from '../../page-request';
import { stationBackground } from './station-background';
import { StationScreen } from './station-screen';

interface Props {
  params: Promise<{ region: string; code: string }>;
  searchParams: Promise<PageQuery>;
}

export async function generateMetadata({ params, searchParams }: Props): Promise<Metadata> {
  const { region: slug, code } = await params;
  const { region } = await pageRequest(slug, await searchParams);
  const station = await getStation(region.id, decodeURIComponent(code));
  return { title: station ? station.name : 'No such station' };
}

/** One station: what it is, what its lows do, what that rests on, and how it stands among the others. */
export default async function StationPage({ params, searchParams }: Props) {
  const { region: slug, code: encoded } = await params;
  const code = decodeURIComponent(encoded);
  const { region, basis, basisProblem, query } = await pageRequest(slug, await searchParams);
  const [detail, background] = await Promise.all([
    stationDetail(region, basis, code),
    stationBackground(region.id, code),
  ]);
  if (!detail || !background) notFound();
  const { ranking } = await rankingOf(region, basis);
  return (
    <>
      <Header region={region} />
      <main id="main">
        <BasisSentence resolved={detail.basis} base={region.basis}>
          {basisProblem && <ErrorNote title="The region’s own terms are shown">{basisProblem}</ErrorNote>}
        </BasisSentence>
        <StationScreen
          region={region}
          detail={detail}
          background={background}
          rows={ranking.rows}
          query={query}
          basisQuery={basisToQuery(basis, region.basis).toString()}
        />
      </main>
    </>
  );
}
