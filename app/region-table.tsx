import Link from 'next/link';
import type { RegionSummary } from '@/lib/store/regions';
import { fixed, MISSING, range } from './components/format.ts';
import { regionHref } from './components/links.ts';
import { ScrollFrame } from './components/scroll-frame.tsx';
import styles from './page.module.css';

/** The regions with what each holds, and the day (UTC) of its latest import. */
export function RegionTable({ regions }: { regions: RegionSummary[] }) {
  return (
    <ScrollFrame label="Regions" className={styles.frame}>
      <table className={styles.table}>
        <thead>
          <tr>
            <th scope="col">Region</th>
            <th scope="col">Stations</th>
            <th scope="col" className={styles.spare}>
              With flows
            </th>
            <th scope="col">Years</th>
            <th scope="col" className={styles.spare}>
              Last import
            </th>
          </tr>
        </thead>
        <tbody>
          {regions.map((region) => (
            <tr key={region.id}>
              <th scope="row">
                <Link href={regionHref(region.slug, 'map')} prefetch={false}>
                  {region.name}
                </Link>
                {region.invented && <em> (invented, for trying things out)</em>}
              </th>
              <td>{fixed(region.stations)}</td>
              <td className={styles.spare}>{fixed(region.records)}</td>
              <td>
                {region.firstYear === null || region.lastYear === null
                  ? MISSING
                  : range(region.firstYear, region.lastYear)}
              </td>
              <td className={styles.spare}>{region.lastImport ?? MISSING}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </ScrollFrame>
  );
}
