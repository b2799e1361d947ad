import type { ReactNode } from 'react';
import { type Basis, basisSentenceParts, type ResolvedBasis } from '@/lib/basis';
import styles from './basis-sentence.module.css';
import { BasisTerms } from './basis-terms.tsx';

interface BasisSentenceProps {
  /** the basis in force, as the region's records resolved it */
  resolved: ResolvedBasis;
  /** the region's own basis: what links leave unsaid */
  base: Basis;
  /** one line under the sentence: the answer, in figures */
  children?: ReactNode;
}

/** The terms of comparison as the page's headline, every term editable in place. Editing writes the basis keys into the
 *  address and leaves its other parameters alone. */
export function BasisSentence({ resolved, base, children }: BasisSentenceProps) {
  const { asked, ...rest } = resolved;
  return (
    <section aria-label="Terms of comparison" className={styles.band}>
      <BasisTerms
        parts={basisSentenceParts(resolved)}
        basis={{ ...rest, ...asked }}
        base={base}
        resolved={{ period: resolved.period, yearStart: resolved.yearStart }}
      />
      {children && <div className={styles.answer}>{children}</div>}
    </section>
  );
}
