import type { Metadata } from 'next';
import { BasisSentence } from '@/app/components/basis-sentence';
import { exceedanceText } from '@/app/components/duration-figure/figure-text';
import { Header } from '@/app/components/header';
import { stationHref } from '@/app/components/links';
import { ErrorNote } from '@/app/components/notes';
import { curvesOf } from '@/lib/jobs/curves';
import { rankingOf } from '@/lib/jobs/ranking';
import { NoRecords } from '../no-records';
import { type PageQuery, pageRequest } from '../page-request';
import { chooseStations } from './choose-stations';
import { CurvesScreen } from './curves-screen';
import { readChoice, readKind, shownFlows } from './curves-view';

export const metadata: Metadata = { title: 'Duration curves' };

interface Props {
  params: Promise<{ region: string }>;
  searchParams: Promise<PageQuery>;
}

/** Duration curves of chosen stations, made comparable as the basis says, over what the region's other stations do. */
export default async function CurvesPage({ params, searchParams }: Props) {
  const { region, basis, basisProblem, query } = await pageRequest((await params).region, await searchParams);
  const kind = readKind(query.get('kind'));
  const [curves, { ranking }] = await Promise.all([curvesOf(region, basis, kind), rankingOf(region, basis)]);
  const choice = readChoice(query.get('stations'));
  const stations = ranking.rows.map((row) => ({
    code: row.code,
    name: row.name,
    river: row.river,
    rank: row.rank,
    latitude: row.latitude,
    longitude: row.longitude,
  }));
  const chosen = new Set(chooseStations(stations, choice, query.get('view')));
  const flowsOf = (flows: ArrayLike<number>) => shownFlows(flows, curves.unit, basis.units);
  const yearsOf = new Map(ranking.rows.map((row) => [row.code, row.yearsUsed]));
  const curveOf = new Map(curves.curves.map((curve) => [curve.station.code, curve]));
  const shown = stations.flatMap(({ code, name }) => {
    const curve = chosen.has(code) ? curveOf.get(code) : undefined;
    if (!curve) return [];
    const href = stationHref(region.slug, code, query);
    return [{ code, name, href, flows: flowsOf(curve.flows), years: curve.years, days: curve.days }];
  });
  const { p10, p50, p90 } = curves.band;

  if (stations.length === 0) {
    return (
      <>
        <Header region={region} page="curves" />
        <main id="main">
          <NoRecords slug={region.slug} name={region.name} />
        </main>
      </>
    );
  }
  return (
    <>
      <Header region={region} page="curves" />
      <main id="main">
        <h1 className="visually-hidden">Duration curves of {region.name}</h1>
        <BasisSentence resolved={curves.basis} base={region.basis}>
          {basisProblem && <ErrorNote title="The region’s own terms are shown">{basisProblem}</ErrorNote>}
        </BasisSentence>
        <CurvesScreen
          slug={region.slug}
          kind={kind}
          normalise={basis.normalise}
          ownNormalise={region.basis.normalise}
          units={basis.units}
          unit={curves.unit}
          exceedances={Array.from(curves.exceedances, (p) => Number(exceedanceText(p)) / 100)}
          stations={stations}
          choice={choice}
          chosen={[...chosen]}
          hasMapView={query.has('view')}
          shown={shown}
          leftOut={curves.leftOut.map(({ station, reason }) => ({
            code: station.code,
            name: station.name,
            reason,
            curable: basis.normalise !== 'none' && (yearsOf.get(station.code) ?? 0) > 0,
          }))}
          band={{ p10: flowsOf(p10), p50: flowsOf(p50), p90: flowsOf(p90) }}
        />
      </main>
    </>
  );
}
