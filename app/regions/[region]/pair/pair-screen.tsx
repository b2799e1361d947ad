import Link from 'next/link';
import { Cautions } from '@/app/components/cautions';
import { writeCodes } from '@/app/components/codes-in-address';
import { apiHref, regionHref, stationHref } from '@/app/components/links';
import { Empty, ErrorNote } from '@/app/components/notes';
import type { ResolvedBasis } from '@/lib/basis';
import type { RankingRow } from '@/lib/region/ranking-types';
import type { RegionRow } from '@/lib/store/regions';
import { PrintButton } from '../stations/[code]/print-button';
import { ChoosePair } from './choose-pair';
import { ComparisonSection } from './comparison-section';
import type { PairAnswers } from './pair-answers';
import styles from './pair-screen.module.css';
import { WeatherSection } from './weather-section';

interface Props {
  region: Pick<RegionRow, 'slug' | 'name'>;
  basis: ResolvedBasis;
  answers: PairAnswers;
  rows: readonly RankingRow[];
  query: URLSearchParams;
}

/** Choice of station and references, and what the comparison came to. */
export function PairScreen({ region, basis, answers, rows, query }: Props) {
  const { station, candidates, references, ownChoice, comparison, weather, problems, unknownStation, changes } =
    answers;
  const stations = rows
    .map(({ code, name, influence }) => ({ code, name, influence }))
    .sort((a, b) => a.name.localeCompare(b.name, 'en'));
  const table = (name: string, more: Record<string, string>) => {
    const href = apiHref(region.slug, `stations/${encodeURIComponent(station?.code ?? '')}/${name}`, query, 'csv');
    const text = new URLSearchParams(more).toString();
    return text ? `${href}&${text}` : href;
  };
  const hrefWith = (change: Record<string, string>) => {
    const next = new URLSearchParams(query);
    for (const [name, value] of Object.entries(change)) next.set(name, value);
    return `/regions/${encodeURIComponent(region.slug)}/pair?${next.toString().replaceAll('%2C', ',')}`;
  };
  return (
    <article className={styles.page}>
      <header className={styles.head}>
        <nav className={styles.steps} aria-label="Ways from here">
          {station ? (
            <Link href={stationHref(region.slug, station.code, query)} prefetch={false}>
              ← {station.name || station.code}
            </Link>
          ) : (
            <Link href={regionHref(region.slug, 'map', query)} prefetch={false}>
              ← Map and ranking
            </Link>
          )}
          <PrintButton />
        </nav>
        <h1>
          Against a reference
          {station && <span className={styles.of}>{station.name || station.code}</span>}
        </h1>
        <p className={styles.lead}>
          Rivers near one another share their weather. Over a river where nothing is done, the ratio takes the weather
          out: what still moves is what one of the two alone has undergone.
        </p>
      </header>
      <aside className={styles.side}>
        <ChoosePair
          stations={stations}
          station={station?.code ?? null}
          candidates={candidates}
          references={references}
          ownChoice={ownChoice}
        />
      </aside>
      <div className={styles.answers}>
        {(unknownStation !== null || problems.length > 0) && (
          <ErrorNote title="Not all of the address could be followed">
            {[unknownStation, ...problems].filter(Boolean).join(' ')}
          </ErrorNote>
        )}
        {!station && (
          <Empty title="Choose a station">
            <p>It is then compared with the natural stations nearby that go most with it, or with those you choose.</p>
          </Empty>
        )}
        {station && !comparison && (
          <Empty title="Choose a reference">
            <p>Tick a natural station, or add another by name. Several count as their mean.</p>
          </Empty>
        )}
        {comparison && (
          <ComparisonSection
            comparison={comparison}
            changes={changes}
            basis={basis}
            csv={table('pair', { with: writeCodes(references) })}
          />
        )}
        {weather && (
          <WeatherSection
            weather={weather}
            basis={basis}
            csv={table(
              'weather',
              weather.trend
                ? {
                    ...{ quantity: weather.trend.quantity, from: weather.trend.from.code },
                    antecedentDays: String(weather.trend.antecedentDays),
                  }
                : {},
            )}
            hrefWith={hrefWith}
          />
        )}
      </div>
      <footer className={styles.foot}>
        <ul className={styles.cautions}>
          <li>A reference must itself be undisturbed: what happens there shows in the ratio with its sign turned.</li>
          <li>Trying references until one gives the answer wanted is no test: choose them before you look.</li>
        </ul>
        <Cautions />
      </footer>
    </article>
  );
}
