'use client';
import { parseAsStringLiteral, useQueryState } from 'nuqs';
import { useMemo } from 'react';
import { apiHref } from '@/app/components/links';
import { ErrorNote, Loading } from '@/app/components/notes';
import { Segmented } from '@/app/components/segmented';
import ui from '@/app/components/ui.module.css';
import { useAnswer } from '@/app/components/use-answer';
import styles from '../station-screen.module.css';
import { CHART_FIGURES, type ChartFigure, changesOf, type StartEndAnswer } from './start-end-answer.ts';
import { StartEndChart, type TrendWays } from './start-end-chart.tsx';
import { StartEndTable } from './start-end-table.tsx';
import { steadinessWords } from './steadiness-words.ts';

interface Props {
  slug: string;
  /** the basis in force, as URL text */
  terms: string;
  code: string;
  name: string;
  /** significance of the basis */
  alpha: number;
  ways: TrendWays;
}

const FIGURE = parseAsStringLiteral(CHART_FIGURES).withDefault('z');

/** How the station's trend depends on the years chosen: every start year and end year, and how many agree. */
export function StartEndSection({ slug, terms, code, name, alpha, ways }: Props) {
  const table = `stations/${encodeURIComponent(code)}/start-end`;
  const { value, problem } = useAnswer<StartEndAnswer>(apiHref(slug, table, terms));
  const [figure, setFigure] = useQueryState('chart', FIGURE);
  return (
    <section id="start-end" className={styles.wide} aria-labelledby="start-end-title">
      <div className={styles.sectionHead}>
        <h2 id="start-end-title">By the years chosen</h2>
        <a className={ui.button} href={apiHref(slug, table, terms, 'csv')} download>
          Start–end CSV
        </a>
      </div>
      {problem !== null && <ErrorNote title="The start–end chart could not be made">{problem}</ErrorNote>}
      {!value && problem === null && <Loading>Looking at every start and end year…</Loading>}
      {value && value.starts.length === 0 && (
        <p className={styles.nothing}>
          No window of at least 15 usable years lies inside the period, so there is nothing to choose.
        </p>
      )}
      {value && value.starts.length > 0 && (
        <Answer
          answer={value}
          name={name}
          alpha={alpha}
          ways={ways}
          figure={figure}
          onFigure={(next) => void setFigure(next)}
        />
      )}
    </section>
  );
}

interface AnswerProps {
  answer: StartEndAnswer;
  name: string;
  alpha: number;
  ways: TrendWays;
  figure: ChartFigure;
  onFigure(figure: ChartFigure): void;
}

function Answer({ answer, name, alpha, ways, figure, onFigure }: AnswerProps) {
  const { unit } = useMemo(() => changesOf(answer), [answer]);
  return (
    <div className={styles.answer}>
      <p>{steadinessWords(answer)}</p>
      <Segmented<ChartFigure>
        label="Colour says"
        value={figure}
        options={[
          { value: 'z', label: 'how sure: Z' },
          { value: 'change', label: unit ? `how much: ${unit} per decade` : 'how much: change per decade' },
        ]}
        onChange={onFigure}
      />
      <StartEndChart answer={answer} name={name} alpha={alpha} figure={figure} ways={ways} />
      <StartEndTable answer={answer} figure={figure} />
    </div>
  );
}
