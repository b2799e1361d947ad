'use client';
import { fixed } from '@/app/components/format';
import { LongWait } from '@/app/components/long-wait';
import { ScrollFrame } from '@/app/components/scroll-frame';
import ui from '@/app/components/ui.module.css';
import type { LongResult } from '@/app/components/use-long-result';
import type { Alternative } from '@/lib/region/window-types';
import styles from '../evidence.module.css';
import table from '../evidence-table.module.css';
import { Section } from '../section.tsx';
import { TermRow } from './term-row.tsx';
import { TERM_WORDS } from './term-words.ts';

interface Props {
  answer: LongResult<readonly Alternative[]>;
  /** the rankings were asked for: with many stations only when the reader wants them */
  asked: boolean;
  stations: number;
  onAsk(): void;
  /** makes the change the basis */
  onUse(change: Readonly<Record<string, string>>): void;
  /** where it is told who moved, on the terms at hand against the changed ones */
  movementOf(change: Readonly<Record<string, string>>): string;
  csv: string | null;
}

/** How the answer depends on the terms: the ranking under other choices of one term at a time. */
export function TermsSection({ answer, asked, stations, onAsk, onUse, movementOf, csv }: Props) {
  const { value } = answer;
  return (
    <Section
      id="terms"
      title="By the terms chosen"
      lead="The region ranked under other choices, one term changed at a time and all others as they are. Order compares the places with those on the terms at hand: 1 the same order, 0 none in common."
      csv={csv}
      csvName="Terms CSV"
    >
      {asked ? (
        <LongWait answer={answer} title="Ranking on other terms" failed="The other terms could not be tried" />
      ) : (
        <p>
          {fixed(stations)} stations are ranked anew under every choice, which takes a while.{' '}
          <button type="button" className={ui.button} onClick={onAsk}>
            Rank on other terms
          </button>
        </p>
      )}
      {value && (
        <div className={styles.body} aria-busy={answer.pending}>
          <ScrollFrame className={table.scroll} label="The ranking under other terms">
            <table className={table.table}>
              <caption>
                <span>
                  Stations falling and rising by adjusted p, and how the places differ from those on the terms at hand
                </span>
              </caption>
              <thead>
                <tr>
                  <th scope="col">Terms</th>
                  <th scope="col" className={table.number}>
                    Ranked
                  </th>
                  <th scope="col" className={table.number}>
                    Falling
                  </th>
                  <th scope="col" className={table.number}>
                    Rising
                  </th>
                  <th scope="col" className={table.number}>
                    Order, tau
                  </th>
                  <th scope="col" className={table.number}>
                    Moved far
                  </th>
                  <th scope="col">Moved furthest</th>
                  <th scope="col">
                    <span className="visually-hidden">Take over</span>
                  </th>
                </tr>
              </thead>
              {byTerm(value).map(({ term, alternatives }) => (
                <tbody key={term}>
                  <tr>
                    <th scope="rowgroup" colSpan={8} className={table.group}>
                      {TERM_WORDS[term]}
                    </th>
                  </tr>
                  {alternatives.map((alternative) => (
                    <TermRow key={alternative.label} {...{ alternative, onUse, movementOf }} />
                  ))}
                </tbody>
              ))}
            </table>
          </ScrollFrame>
          <p className={styles.note}>
            Moved far: stations ranked on both terms whose places differ by more than a tenth of these stations.
          </p>
        </div>
      )}
    </Section>
  );
}

/** In the order in which the terms come. */
function byTerm(alternatives: readonly Alternative[]): { term: Alternative['term']; alternatives: Alternative[] }[] {
  const terms = [...new Set(alternatives.map(({ term }) => term))];
  return terms.map((term) => ({ term, alternatives: alternatives.filter((one) => one.term === term) }));
}
