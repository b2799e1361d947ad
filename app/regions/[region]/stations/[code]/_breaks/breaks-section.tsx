'use client';
import { parseAsString, useQueryState } from 'nuqs';
import { count } from '@/app/components/format';
import { apiHref } from '@/app/components/links';
import { ErrorNote, Loading } from '@/app/components/notes';
import ui from '@/app/components/ui.module.css';
import { useAnswer } from '@/app/components/use-answer';
import { lowFlowYearLabel } from '@/lib/calendar/low-flow-year';
import type { StationBreaks } from '@/lib/region/break-types';
import { BreakChooser } from '../../../evidence/_breaks/break-chooser.tsx';
import { breaksFromText, breaksToText } from '../../../evidence/_breaks/break-list.ts';
import styles from '../station-screen.module.css';
import { type BreaksData, BreaksFigure } from './breaks-figure.tsx';
import { StepTable } from './step-table.tsx';

interface Props {
  slug: string;
  /** the basis in force, as URL text */
  terms: string;
  code: string;
  data: BreaksData;
  yearStart: number;
  /** significance of the basis */
  alpha: number;
}

/** Levels before and after dated changes and chosen breaks; a break that the data suggest is shown and never tested. */
export function BreaksSection({ slug, terms, code, data, yearStart, alpha }: Props) {
  const [text, setText] = useQueryState('breaks', parseAsString);
  const chosen = breaksFromText(text);
  const address = (format?: string) => {
    const href = apiHref(slug, `stations/${encodeURIComponent(code)}/breaks`, terms, format);
    const breaks = breaksToText(chosen);
    return breaks === null ? href : `${href}${href.includes('?') ? '&' : '?'}breaks=${breaks}`;
  };
  const { value, problem, pending } = useAnswer<StationBreaks>(address());
  const labelOf = (year: number) => lowFlowYearLabel(year, yearStart);
  return (
    <section id="breaks" className={styles.wide} aria-labelledby="breaks-title">
      <div className={styles.sectionHead}>
        <h2 id="breaks-title">Before and after</h2>
        <a className={ui.button} href={address('csv')} download>
          Breaks CSV
        </a>
      </div>
      <div className={styles.answer}>
        <p className={styles.caption}>
          Levels between breaks that were known or chosen beforehand. A break chosen because these figures show one
          there is bound to test well; and a break is not a cause.
        </p>
        <BreakChooser
          years={chosen}
          span={data.span}
          labelOf={labelOf}
          onChange={(years) => void setText(breaksToText(years), { history: 'push' })}
          none="No break is chosen: the years are parted at the station’s own dated changes (a dam, an abstraction, a new weir)."
          back="Back to the station’s own changes"
        />
        {problem !== null && <ErrorNote title="Before and after could not be compared">{problem}</ErrorNote>}
        {!value && problem === null && <Loading>Comparing before and after…</Loading>}
        {value && (
          <div className={styles.answer} aria-busy={pending}>
            {value.problem !== null && <p>No comparison: {value.problem}.</p>}
            {value.problem === null && value.steps.length === 0 && (
              <p>The station has no dated change with usable years on both sides, and none is chosen.</p>
            )}
            <BreaksFigure data={data} breaks={value} labelOf={labelOf} />
            <StepTable breaks={value} scale={data.scale} labelOf={labelOf} alpha={alpha} />
            {value.leftOut.length > 0 && (
              <p className={styles.caption}>
                {count(value.leftOut.length, 'break')} left out:{' '}
                {value.leftOut.map(({ break: { words }, reason }) => `${words} (${reason})`).join('; ')}.
              </p>
            )}
            <p className={styles.suggested}>
              {value.suggested ? value.suggested.words : 'These figures suggest no break.'}
            </p>
          </div>
        )}
      </div>
    </section>
  );
}
