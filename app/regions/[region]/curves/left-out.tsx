import Link from 'next/link';
import { useSearchParams } from 'next/navigation';
import { stationHref } from '@/app/components/links';
import type { Basis } from '@/lib/basis';
import styles from './curves-screen.module.css';

export interface LeftOutStation {
  code: string;
  name: string;
  reason: string;
  /** it has usable years, so that on another scale it would have a curve */
  curable: boolean;
}

interface Props {
  slug: string;
  stations: readonly LeftOutStation[];
  normalise: Basis['normalise'];
  onNormalise(value: Basis['normalise']): void;
}

/** Names shown before the rest folds away. */
const NAMED = 6;

/** Stations without a curve on these terms, by name and with the reason, and the terms on which they have one. */
export function LeftOut({ slug, stations, normalise, onNormalise }: Props) {
  const query = useSearchParams();
  if (stations.length === 0) return null;
  const reasons = [...new Set(stations.map((station) => station.reason))];
  const others = (['mean', 'median'] as const).filter((other) => other !== normalise);
  return (
    <div className={styles.leftOut} role="note">
      {reasons.map((reason) => {
        const same = stations.filter((station) => station.reason === reason);
        const names = (some: readonly LeftOutStation[]) =>
          some.map((station, index) => (
            <span key={station.code}>
              {index > 0 && ', '}
              <Link href={stationHref(slug, station.code, query)} prefetch={false}>
                {station.name}
              </Link>
            </span>
          ));
        return (
          <div key={reason}>
            <strong>Without a curve:</strong> {names(same.slice(0, NAMED))} – {reason}.{' '}
            {same.some((station) => station.curable) &&
              others.map((other) => (
                <button key={other} type="button" className={styles.way} onClick={() => onNormalise(other)}>
                  compare as a ratio to the {other} flow
                </button>
              ))}
            {same.length > NAMED && (
              <details>
                <summary>and {same.length - NAMED} more</summary>
                {names(same.slice(NAMED))}
              </details>
            )}
          </div>
        );
      })}
    </div>
  );
}
