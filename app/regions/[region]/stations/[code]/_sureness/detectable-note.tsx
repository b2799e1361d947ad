'use client';
import { MISSING } from '@/app/components/format';
import { useCertaintyOfPage } from '../../../_certainty/certainty-context.tsx';
import { type DetectableTerms, detectableText } from '../../../_certainty/detectable-text.ts';
import styles from '../station-screen.module.css';

/** Beside a trend that is not significant: the one that this record would have shown. Nothing while that is not known. */
export function DetectableNote({ code, terms }: { code: string; terms: DetectableTerms }) {
  const { view } = useCertaintyOfPage();
  const shown = detectableText(view?.detectable.get(code), terms);
  if (shown === MISSING) return null;
  return (
    <p className={styles.note}>
      Detectable trend: this record would have shown {shown} per decade or more, either way, in four cases of five. A
      smaller change may have gone unseen.
    </p>
  );
}
