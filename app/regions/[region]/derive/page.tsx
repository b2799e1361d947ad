import type { Metadata } from 'next';
import { Header } from '@/app/components/header';
import { regionHref } from '@/app/components/links';
import styles from '@/app/components/station-form/station-form.module.css';
import { listStations } from '@/lib/store/stations';
import { type PageQuery, pageRequest } from '../page-request';
import { DeriveForm } from './derive-form';

export const metadata: Metadata = { title: 'Derive a record' };

interface Props {
  params: Promise<{ region: string }>;
  searchParams: Promise<PageQuery>;
}

/** A station whose record comes from others. */
export default async function DerivePage({ params, searchParams }: Props) {
  const { region, query } = await pageRequest((await params).region, await searchParams);
  const stations = (await listStations(region.id)).map(({ code, name }) => ({ code, name }));
  const from = stations.find(({ code }) => code === query.get('from')) ?? null;
  return (
    <>
      <Header region={region} />
      <main id="main" className={styles.page}>
        <header>
          <h1>Derive a record from others</h1>
          <p className={styles.lead}>
            A sum or difference of records, day by day: a naturalised flow (flow plus what is taken out), the gain
            between two gauges (the lower less the upper a day before), a joint supply. It is made anew whenever one of
            its parts changes, and marked as derived wherever it is shown.
          </p>
        </header>
        <DeriveForm slug={region.slug} stations={stations} from={from} home={regionHref(region.slug, 'map', query)} />
      </main>
    </>
  );
}
