'use client';
import { MISSING, shareText } from '@/app/components/format';
import { LongWait } from '@/app/components/long-wait';
import { useCertaintyOfPage } from '../../../_certainty/certainty-context.tsx';
import { amongSteepest } from '../../../_certainty/certainty-view.ts';
import { type DetectableTerms, detectableText } from '../../../_certainty/detectable-text.ts';
import { amongWords, toldApartWords } from '../../../_certainty/place-words.ts';
import { SpanFigure } from '../../../_ranking/span-figure.tsx';
import { spanText } from '../../../_ranking/sureness-cells.tsx';
import { FigureTable } from '../figure-table.tsx';
import styles from '../station-screen.module.css';
import { useSteepest } from './place-note.tsx';

interface Props {
  code: string;
  rank: number | null;
  steadiness: string;
  terms: DetectableTerms;
}

/** How sure the place and the trend are: rank span, steadiness, and what the record could have shown. */
export function SurenessFigures({ code, rank, steadiness, terms }: Props) {
  const answer = useCertaintyOfPage();
  const k = useSteepest();
  const { view } = answer;
  const span = view?.spans.get(code);
  const share = view && amongSteepest(view, code, k);
  const figures: [string, string][] = [
    ...(rank === null
      ? []
      : ([
          ['Rank span, 90 %', span ? `${spanText(span.rankLow, span.rankHigh)} of ${view?.places}` : MISSING],
          [`Chance to be ${amongWords(k)}`, shareText(share)],
        ] as [string, string][])),
    ['Steadiness', steadiness],
    ['Detectable trend, per decade', view ? detectableText(view.detectable.get(code), terms) : MISSING],
  ];
  return (
    <section className={styles.trend} aria-labelledby="sureness-title">
      <h2 id="sureness-title">How sure?</h2>
      {view && span && <SpanFigure low={span.rankLow} high={span.rankHigh} rank={rank} places={view.places} />}
      <FigureTable figures={figures} />
      {view && !view.toldApart && <p className={styles.caption}>{toldApartWords(view)}</p>}
      <LongWait answer={answer} title="Working out the rank spans" failed="The rank spans could not be worked out" />
      <p className={styles.caption}>
        The span’s guarantee is an average over stations. The detectable trend is the one that this record would have
        shown in four cases of five.
      </p>
    </section>
  );
}
