import ui from '@/app/components/ui.module.css';
import styles from './import-page.module.css';

/** The region as an archive: to keep, to hand on, or to make the same region elsewhere. */
export function TakeAlong({ slug }: { slug: string }) {
  const address = `/api/regions/${encodeURIComponent(slug)}/archive`;
  return (
    <section aria-labelledby="take-along">
      <h2 id="take-along">Take the region along</h2>
      <p className={styles.lead}>
        One ZIP file of open formats: stations and layers as GeoJSON, the days of every import as they were written, its
        list of imports, and what people have said of stations and days. Dropped where files are imported, here or
        elsewhere, it gives the same region.
      </p>
      <ul className={styles.archives}>
        <li>
          <a className={ui.button} href={`${address}?waterml=no`} download>
            Archive
          </a>
          <span className={ui.hint}>All that is needed to make the region again; a few bytes a day and station.</span>
        </li>
        <li>
          <a className={ui.button} href={address} download>
            Archive with WaterML
          </a>
          <span className={ui.hint}>
            The same days a second time, one WaterML 2.0 document a station and quantity, for programs that read that
            standard: two to three times as large, and slower to make.
          </span>
        </li>
      </ul>
    </section>
  );
}
