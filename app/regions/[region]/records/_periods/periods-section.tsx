'use client';
import { useSearchParams } from 'next/navigation';
import { useMemo, useState } from 'react';
import { range } from '@/app/components/format';
import { apiHref } from '@/app/components/links';
import { Empty, ErrorNote, Loading } from '@/app/components/notes';
import ui from '@/app/components/ui.module.css';
import { useAnswer } from '@/app/components/use-answer';
import { useBasisKeys } from '@/app/components/use-basis-keys';
import type { ResolvedBasis } from '@/lib/basis';
import type { CommonPeriods } from '@/lib/jobs/records-types';
import { Completeness } from './completeness.tsx';
import type { OwnTerms } from './own-terms.ts';
import { PeriodFigure } from './period-figure.tsx';
import { layOutPeriods, periodCount, periodsByWorth } from './period-grid.ts';
import { PeriodMatrix } from './period-matrix.tsx';
import { kept } from './period-words.ts';
import styles from './periods.module.css';

interface Props {
  slug: string;
  basis: ResolvedBasis;
  own: OwnTerms;
}

/** How many of the best periods are listed. */
const LISTED = 8;

/** Over which years the records can be compared: what every start and end year would leave, and a click that makes it the
 *  basis's period. */
export function PeriodsSection({ slug, basis, own }: Props) {
  const query = useSearchParams().toString();
  const { pending, set } = useBasisKeys(own);
  const [said, setSaid] = useState('');
  const address = apiHref(slug, 'common-periods', query);
  const { value: periods, problem } = useAnswer<CommonPeriods>(address);
  const best = useMemo(() => (periods ? periodsByWorth(periods).slice(0, LISTED) : []), [periods]);
  if (problem) return <ErrorNote title="The periods could not be counted">{problem}</ErrorNote>;
  if (!periods) return <Loading>Counting stations for every start and end year…</Loading>;

  const use = (first: number, last: number) => {
    set({ period: `${first}-${last}` });
    setSaid(`The basis’s period is now ${range(first, last)}: ranking, map and curves follow it.`);
  };
  const backToCommon = () => {
    set({ period: 'common' });
    setSaid('The basis’s period is the common period again.');
  };
  const current = basis.period && periodCount(periods, basis.period[0], basis.period[1]);

  return (
    <div className={styles.section} aria-busy={pending}>
      <p className={styles.plain}>
        A longer period leaves fewer stations, a shorter one says less of each. Every cell is a period: its start year
        at the side, its end year above. The common period is the one with the most station-years.
      </p>
      <div className={styles.tools}>
        <Completeness basis={basis} onChange={set} />
        <a className={ui.button} href={apiHref(slug, 'common-periods', query, 'csv')} download>
          Periods CSV
        </a>
      </div>
      <p className={styles.now} role="status">
        {said && <strong>{said} </strong>}
        {basis.period === null
          ? 'The basis has no common period: each station is taken over its own years.'
          : `${basis.asked.period === 'common' ? 'The common period' : 'The basis’s period'} ${range(basis.period[0], basis.period[1])} keeps ${kept(current, periods.stations)}.`}{' '}
        {basis.asked.period !== 'common' && (
          <button type="button" className={ui.plain} onClick={backToCommon}>
            Use the common period
            {periods.common && ` (${range(periods.common[0], periods.common[1])})`}
          </button>
        )}
      </p>
      {layOutPeriods(periods, 900) === null ? (
        <Empty title="No period is long enough">
          <p>
            The usable years of all stations together span fewer than {basis.minYears} years. Ask for fewer years, or
            let more missing days pass.
          </p>
        </Empty>
      ) : (
        <>
          <PeriodFigure periods={periods} current={basis.period} onUse={use} />
          <section aria-labelledby="best-title">
            <h2 id="best-title">The periods with the most station-years</h2>
            {best.length === 0 ? (
              <p className={styles.plain}>No period would leave a single station on these terms.</p>
            ) : (
              <ol className={styles.best}>
                {best.map((period) => (
                  <li key={`${period.first}-${period.last}`}>
                    <span>
                      <strong>{range(period.first, period.last)}</strong>: {kept(period, periods.stations)}
                    </span>
                    <button
                      type="button"
                      className={ui.plain}
                      aria-label={`Use it: ${range(period.first, period.last)}`}
                      onClick={() => use(period.first, period.last)}
                    >
                      Use it
                    </button>
                  </li>
                ))}
              </ol>
            )}
          </section>
          <PeriodMatrix periods={periods} />
        </>
      )}
    </div>
  );
}
