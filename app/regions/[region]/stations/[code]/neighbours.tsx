import Link from 'next/link';
import { fixed, signed } from '@/app/components/format';
import { stationHref } from '@/app/components/links';
import { needleOf, needleWords } from '@/app/components/needle';
import { NeedleMark } from '@/app/components/needle-mark';
import type { Neighbour } from '@/lib/jobs/types';
import type { RankingRow, StationFacts } from '@/lib/region/ranking-types';
import styles from './station-screen.module.css';

interface Props {
  slug: string;
  station: StationFacts;
  near: readonly Neighbour[];
  rows: readonly RankingRow[];
  query: URLSearchParams;
}

/** Most stations of the same river that are listed beyond the nearest ones. */
const MOST_ON_RIVER = 6;

/** Nearest stations, then the others on the same river, each with its mark. */
export function Neighbours({ slug, station, near, rows, query }: Props) {
  const rowOf = new Map(rows.map((row) => [row.code, row]));
  const nearCodes = new Set(near.map((neighbour) => neighbour.station.code));
  const onRiver = rows
    .filter((row) => station.river !== '' && row.river === station.river)
    .filter((row) => row.code !== station.code && !nearCodes.has(row.code))
    .slice(0, MOST_ON_RIVER);
  const item = (row: RankingRow, where: string) => {
    const needle = needleOf(row);
    return (
      <li key={row.code}>
        <Link href={stationHref(slug, row.code, query)} prefetch={false}>
          <NeedleMark needle={needle} size={24} />
          <span className={styles.neighbourName}>{row.name}</span>
        </Link>
        <span className={styles.neighbourFacts}>
          {where} ·{' '}
          {row.percentPerDecade === null ? needleWords(needle) : `${signed(row.percentPerDecade)} % per decade`}
          {row.rank !== null && ` · no. ${row.rank}`}
        </span>
      </li>
    );
  };
  if (near.length === 0 && onRiver.length === 0) return null;
  return (
    <section className={styles.neighbours} aria-labelledby="neighbours-title">
      <h2 id="neighbours-title">Neighbours</h2>
      <ul>
        {near.flatMap(({ station: other, distanceKm }) => {
          const row = rowOf.get(other.code);
          const river = other.river !== '' && other.river === station.river ? ', same river' : '';
          return row ? [item(row, `${fixed(distanceKm, distanceKm < 10 ? 1 : 0)} km${river}`)] : [];
        })}
        {onRiver.map((row) => item(row, 'same river'))}
      </ul>
    </section>
  );
}
