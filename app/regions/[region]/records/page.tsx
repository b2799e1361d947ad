import type { Metadata } from 'next';
import { BasisSentence } from '@/app/components/basis-sentence';
import { Header } from '@/app/components/header';
import { ErrorNote } from '@/app/components/notes';
import type { Basis } from '@/lib/basis';
import { recordsOf } from '@/lib/jobs/records';
import { NoRecords } from '../no-records';
import { type PageQuery, pageRequest } from '../page-request';
import type { OwnTerms } from './_periods/own-terms.ts';
import { RecordsScreen } from './records-screen';

export const metadata: Metadata = { title: 'Records' };

interface Props {
  params: Promise<{ region: string }>;
  searchParams: Promise<PageQuery>;
}

/** What the region's records hold, year by year; what the checks found in them; and over which years they can be
 *  compared. */
export default async function RecordsPage({ params, searchParams }: Props) {
  const { region, basis, basisProblem } = await pageRequest((await params).region, await searchParams);
  const { records } = await recordsOf(region, basis);
  if (records.stations.length === 0) {
    return (
      <>
        <Header region={region} page="records" />
        <main id="main">
          <NoRecords slug={region.slug} name={region.name} />
        </main>
      </>
    );
  }
  return (
    <>
      <Header region={region} page="records" />
      <main id="main">
        <h1 className="visually-hidden">Records of {region.name}</h1>
        <BasisSentence resolved={records.basis} base={region.basis}>
          {basisProblem && <ErrorNote title="The region’s own terms are shown">{basisProblem}</ErrorNote>}
        </BasisSentence>
        <RecordsScreen
          slug={region.slug}
          basis={records.basis}
          own={ownTerms(region.basis)}
          stations={records.stations.map(({ code, name }) => ({ code, name }))}
        />
      </main>
    </>
  );
}

/** The region's own terms as an address would write them. */
function ownTerms({ period, minYears, minCoverage }: Basis): OwnTerms {
  return {
    period: period === null ? 'own' : period === 'common' ? period : period.join('-'),
    minYears: String(minYears),
    minCoverage: String(minCoverage),
  };
}
