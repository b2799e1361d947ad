import type { Metadata } from 'next';
import { Header } from '@/app/components/header';
import styles from '@/app/components/station-form/station-form.module.css';
import { suggestedLinks } from '@/lib/jobs/suggested-links';
import { listLinks } from '@/lib/store/links';
import { listStations } from '@/lib/store/stations';
import { type PageQuery, pageRequest } from '../page-request';
import { LinkEditor } from './link-editor';

export const metadata: Metadata = { title: 'Upstream and downstream' };

interface Props {
  params: Promise<{ region: string }>;
  searchParams: Promise<PageQuery>;
}

/** Which stations of the region lie below one another, suggested and confirmed. */
export default async function LinksPage({ params, searchParams }: Props) {
  const { region } = await pageRequest((await params).region, await searchParams);
  const [stations, links, { suggested, rejected, hasRivers }] = await Promise.all([
    listStations(region.id),
    listLinks(region.id),
    suggestedLinks(region.id),
  ]);
  return (
    <>
      <Header region={region} />
      <main id="main" className={styles.page}>
        <header>
          <h1>Links along the rivers of {region.name}</h1>
          <p className={styles.lead}>
            {hasRivers
              ? 'Suggested by following the lines of the river layer down from each station to the next; for stations beside every line, by name of the river, drainage area and distance.'
              : 'The region has no layer of rivers: suggested by name of the river, drainage area and distance.'}{' '}
            Only what a person confirms becomes a link.
          </p>
        </header>
        <LinkEditor
          slug={region.slug}
          stations={stations.map(({ code, name }) => ({ code, name }))}
          links={links}
          suggested={suggested}
          rejected={rejected}
        />
      </main>
    </>
  );
}
