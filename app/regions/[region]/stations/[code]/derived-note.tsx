import Link from 'next/link';
import { stationHref } from '@/app/components/links';
import { deriveText } from '@/lib/series/derive';
import type { StationBackground } from './station-background';
import styles from './station-screen.module.css';

interface Props {
  slug: string;
  background: StationBackground;
  query: URLSearchParams;
}

/** Says of a derived station that nobody measured it, and what it comes from; of a measured one, what comes from it. */
export function DerivedNote({ slug, background: { station, terms, uses }, query }: Props) {
  return (
    <>
      {station.derived && (
        <p className={styles.derived}>
          <strong>Derived, not measured:</strong> {deriveText(station.derived)}
          {station.derived.note && `. ${station.derived.note}`}{' '}
          <span>
            Parts:{' '}
            {[...terms].map(([code, name], index) => (
              <span key={code}>
                {index > 0 && ', '}
                <Link href={stationHref(slug, code, query)} prefetch={false}>
                  {code} {name}
                </Link>
              </span>
            ))}
            .
          </span>
        </p>
      )}
      {uses.length > 0 && (
        <p className={styles.note}>
          Derived with this record:{' '}
          {uses.map(({ code, name }, index) => (
            <span key={code}>
              {index > 0 && ', '}
              <Link href={stationHref(slug, code, query)} prefetch={false}>
                {name}
              </Link>
            </span>
          ))}
          .
        </p>
      )}
    </>
  );
}
