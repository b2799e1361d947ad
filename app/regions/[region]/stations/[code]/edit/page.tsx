import type { Metadata } from 'next';
import Link from 'next/link';
import { notFound } from 'next/navigation';
import { Header } from '@/app/components/header';
import { regionHref, stationHref } from '@/app/components/links';
import styles from '@/app/components/station-form/station-form.module.css';
import { suggestedLinks } from '@/lib/jobs/suggested-links';
import { listLinks } from '@/lib/store/links';
import { editionOf } from '@/lib/store/station-edition';
import { getStation, listStations } from '@/lib/store/stations';
import { LinkEditor } from '../../../links/link-editor';
import { type PageQuery, pageRequest } from '../../../page-request';
import { StationForm } from './station-form';

interface Props {
  params: Promise<{ region: string; code: string }>;
  searchParams: Promise<PageQuery>;
}

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  return { title: `Edit ${decodeURIComponent((await params).code)}` };
}

/** What is known of a station, to be changed by hand. */
export default async function EditStationPage({ params, searchParams }: Props) {
  const { region: slug, code: encoded } = await params;
  const code = decodeURIComponent(encoded);
  const { region, query } = await pageRequest(slug, await searchParams);
  const station = await getStation(region.id, code);
  if (!station) notFound();
  const [stations, links, { suggested, rejected }] = await Promise.all([
    listStations(region.id),
    listLinks(region.id),
    suggestedLinks(region.id),
  ]);
  const { id: _own, code: _code, derived, ...facts } = station;
  const edition = editionOf(station);
  const choices = stations.map(({ code: each, name }) => ({ code: each, name }));
  const isHere = (pair: { upstream: string; downstream: string }) => pair.upstream === code || pair.downstream === code;
  return (
    <>
      <Header region={region} />
      <main id="main" className={styles.page}>
        <header>
          <Link href={stationHref(region.slug, code, query)} prefetch={false}>
            ← {station.name}
          </Link>
          <h1>Edit {code}</h1>
          <p className={styles.lead}>
            What files said of the station, and what a person knows. The days of its record are not changed here.
          </p>
        </header>
        <StationForm
          key={edition}
          slug={region.slug}
          code={code}
          facts={facts}
          recipe={derived}
          edition={edition}
          stations={choices}
          back={stationHref(region.slug, code, query)}
          home={regionHref(region.slug, 'map', query)}
        />
        <LinkEditor
          slug={region.slug}
          station={code}
          stations={choices}
          links={links.filter(isHere)}
          suggested={suggested.filter(isHere)}
          rejected={rejected.filter(isHere)}
        />
      </main>
    </>
  );
}
