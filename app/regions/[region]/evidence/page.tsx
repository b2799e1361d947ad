import type { Metadata } from 'next';
import { BasisSentence } from '@/app/components/basis-sentence';
import { Header } from '@/app/components/header';
import { ErrorNote, WarningNote } from '@/app/components/notes';
import { basisTexts } from '@/lib/basis';
import { listLayers } from '@/lib/store/layers';
import { NoRecords } from '../no-records';
import { type PageQuery, pageRequest } from '../page-request';
import { rankingOrRegionsOwn } from '../ranking-request';
import { EvidenceScreen } from './evidence-screen';

interface Props {
  params: Promise<{ region: string }>;
  searchParams: Promise<PageQuery>;
}

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const { region } = await pageRequest((await params).region, {});
  return { title: `${region.name}: evidence` };
}

/** What the region's stations say together, and how far that depends on chance, on the years and on the terms. */
export default async function EvidencePage({ params, searchParams }: Props) {
  const { region, basis, basisProblem } = await pageRequest((await params).region, await searchParams);
  const [{ ranking, problem }, layers] = await Promise.all([
    rankingOrRegionsOwn(region, basis, basisProblem),
    listLayers(region.id),
  ]);
  if (ranking.rows.length === 0) {
    return (
      <>
        <Header region={region} page="evidence" />
        <main id="main">
          <NoRecords slug={region.slug} name={region.name} />
        </main>
      </>
    );
  }
  return (
    <>
      <Header region={region} page="evidence" />
      <main id="main">
        <h1 className="visually-hidden">Evidence on the low flows of {region.name}</h1>
        <BasisSentence resolved={ranking.basis} base={region.basis}>
          {problem && <ErrorNote title="The region’s own terms are shown">{problem}</ErrorNote>}
          {ranking.warnings.map((warning) => (
            <WarningNote key={warning}>{warning}</WarningNote>
          ))}
        </BasisSentence>
        <EvidenceScreen
          region={{ slug: region.slug, name: region.name, invented: region.invented }}
          basis={ranking.basis}
          own={basisTexts(region.basis)}
          usable={problem === null}
          layers={layers}
          counts={ranking.counts}
          stations={ranking.rows.map(({ code, name, rank, drying, longitude, latitude }) => ({
            ...{ code, name, longitude, latitude },
            ranked: rank !== null,
            drying,
          }))}
        />
      </main>
    </>
  );
}
