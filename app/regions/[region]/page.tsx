import type { Metadata } from 'next';
import { BasisSentence } from '@/app/components/basis-sentence';
import { Header } from '@/app/components/header';
import { ErrorNote, WarningNote } from '@/app/components/notes';
import { basisToQuery } from '@/lib/basis';
import { listLayers } from '@/lib/store/layers';
import { besideRanking, headline } from './headline.ts';
import { mapRows } from './map-row.ts';
import { MapScreen } from './map-screen.tsx';
import { NoRecords } from './no-records.tsx';
import styles from './page.module.css';
import { type PageQuery, pageRequest } from './page-request.ts';
import { rankingOrRegionsOwn } from './ranking-request.ts';

interface PageProps {
  params: Promise<{ region: string }>;
  searchParams: Promise<PageQuery>;
}

export async function generateMetadata({ params }: PageProps): Promise<Metadata> {
  const { region } = await pageRequest((await params).region, {});
  return { title: `${region.name}: map and ranking` };
}

/** The main screen: the terms as headline, the answer under it, then map and ranking side by side. */
export default async function MapPage({ params, searchParams }: PageProps) {
  const { region, basis, basisProblem } = await pageRequest((await params).region, await searchParams);
  const [{ ranking, problem }, layers] = await Promise.all([
    rankingOrRegionsOwn(region, basis, basisProblem),
    listLayers(region.id),
  ]);
  const rows = mapRows(ranking);
  const beside = besideRanking(rows);
  return (
    <div className={styles.page}>
      <Header region={region} page="map" />
      <main id="main" className={styles.main}>
        <h1 className="visually-hidden">{region.name}: map and ranking</h1>
        {rows.length === 0 ? (
          <NoRecords slug={region.slug} name={region.name} />
        ) : (
          <>
            <BasisSentence resolved={ranking.basis} base={region.basis}>
              {problem && <ErrorNote title="The region’s own terms are shown">{problem}</ErrorNote>}
              <p className={styles.answer}>
                <strong>{headline(rows, ranking.basis.alpha, ranking.basis.index)}</strong> {beside}
              </p>
              {ranking.warnings.map((warning) => (
                <WarningNote key={warning}>{warning}</WarningNote>
              ))}
            </BasisSentence>
            <MapScreen
              region={{
                slug: region.slug,
                name: region.name,
                invented: region.invented,
                tileUrl: region.tileUrl,
                tileAttribution: region.tileAttribution,
              }}
              rows={rows}
              layers={layers}
              terms={problem ? '' : basisToQuery(basis, region.basis).toString()}
              rankBy={ranking.basis.rankBy}
              index={ranking.basis.index}
              units={ranking.basis.units}
              span={spanOf(ranking.basis.period, ranking.rows)}
            />
          </>
        )}
      </main>
    </div>
  );
}

/** The years on every row's axis: the period, or all years that any row used. */
function spanOf(period: [number, number] | null, rows: { years: number[] }[]): [number, number] {
  if (period) return period;
  let [first, last] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  for (const { years } of rows) {
    if (years.length === 0) continue;
    first = Math.min(first, years[0]);
    last = Math.max(last, years[years.length - 1]);
  }
  return first <= last ? [first, last] : [0, 1];
}
