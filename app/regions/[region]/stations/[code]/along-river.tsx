import Link from 'next/link';
import { linksHref, stationHref } from '@/app/components/links';
import type { NamedStation, StationBackground } from './station-background';
import styles from './station-screen.module.css';

interface Props {
  slug: string;
  background: StationBackground;
  query: URLSearchParams;
}

/** The next stations up and down the river. */
export function AlongRiver({ slug, background: { upstream, downstream }, query }: Props) {
  const list = (stations: readonly NamedStation[]) =>
    stations.length === 0
      ? 'none known'
      : stations.map(({ code, name }) => (
          <Link key={code} href={stationHref(slug, code, query)} prefetch={false}>
            {name}
          </Link>
        ));
  return (
    <section className={styles.river} aria-labelledby="river-title">
      <h2 id="river-title">Along the river</h2>
      <dl>
        <dt>↑ Next upstream</dt>
        <dd>{list(upstream)}</dd>
        <dt>↓ Next downstream</dt>
        <dd>{list(downstream)}</dd>
      </dl>
      <Link className={styles.toLinks} href={linksHref(slug, query)} prefetch={false}>
        Links of the region
      </Link>
    </section>
  );
}
