import Link from 'next/link';
import { fixed, signed } from '@/app/components/format';
import { stationHref } from '@/app/components/links';
import { needleOf, needleWords } from '@/app/components/needle';
import { NeedleMark } from '@/app/components/needle-mark';
import type { AnnualIndexName } from '@/lib/basis';
import type { Neighbour } from '@/lib/jobs/types';
import { INDEX_FACTS } from '@/lib/region/index-facts';
import type { RankingRow, StationFacts } from '@/lib/region/ranking-types';
import styles from './station-screen.module.css';

interface Props {
  slug: string;
  station: StationFacts;
  near: readonly Neighbour[];
  rows: readonly RankingRow[];
  /** what is compared */
  index: AnnualIndexName;
  query: URLSearchParams;
}

/** Most stations of the same river that are listed beyond the nearest ones. */
const MOST_ON_RIVER = 6;

/** Nearest stations, then the others on the same river, each with its mark. */
export function Neighbours({ slug, station, near, rows, index, query }: Props) {
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
          {where} · {changeWords(row, index) ?? needleWords(needle, index)}
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

/** Its change per decade, in percent of the mean or in days; null where there is none. */
function changeWords({ rank, percentPerDecade, valueSlope }: RankingRow, index: AnnualIndexName): string | null {
  if (percentPerDecade !== null) return `${signed(percentPerDecade)} % per decade`;
  if (rank === null || valueSlope === null || INDEX_FACTS[index].hasPercent) return null;
  return `${signed(valueSlope)} days per decade`;
}
