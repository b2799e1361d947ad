import { ImportForm } from '@/app/components/import-form';
import { uploadsOf } from '@/lib/jobs/open-upload';
import { listRegions } from '@/lib/store/regions';
import { Header } from './components/header.tsx';
import { waitingOf } from './components/import/waiting.ts';
import styles from './page.module.css';
import { RegionTable } from './region-table.tsx';

interface Props {
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}

/** Regions: the list, and a way to make one by dropping files. */
export default async function RegionsPage({ searchParams }: Props) {
  const [regions, waiting, query] = await Promise.all([listRegions(), uploadsOf(null), searchParams]);
  const upload = [query.upload].flat()[0];
  return (
    <>
      <Header />
      <main id="main" className={styles.main}>
        <section className={styles.opening}>
          <h1>Which rivers are losing their low flows?</h1>
          <p>
            Hungerstone takes the daily flows of a region’s gauging stations and says where the lowest flows of each
            year are falling, how fast and how surely. Records of unlike length, size and quality are compared on one
            set of terms, and those terms are printed on everything it makes.
          </p>
        </section>
        {regions.length > 0 && (
          <section aria-labelledby="regions">
            <h2 id="regions">Regions</h2>
            <RegionTable regions={regions} />
          </section>
        )}
        <section aria-labelledby="new-region" className={styles.make}>
          <h2 id="new-region">{regions.length > 0 ? 'Make another region' : 'Make the first region'}</h2>
          <ImportForm
            region={null}
            openUpload={upload ?? null}
            waiting={waiting.map(waitingOf)}
            beside={
              <ol className={styles.steps}>
                <li>
                  <b>Daily flows</b>, the one thing needed: text, workbooks or WaterML, one file for all stations or one
                  each. Layout and dates are recognised by content; where a unit is not written, you are asked.
                </li>
                <li>
                  <b>A registry of stations</b> as CSV or GeoJSON: code, name, latitude, longitude, drainage area. It
                  puts them on the map and lets catchments of unlike size be compared.
                </li>
                <li>
                  <b>Rivers and catchments</b> as GeoJSON, to draw the ground.
                </li>
              </ol>
            }
          />
        </section>
      </main>
    </>
  );
}
