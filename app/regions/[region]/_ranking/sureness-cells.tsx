import { MISSING, range, shareText } from '@/app/components/format';
import { amongSteepest, type CertaintyView } from '../_certainty/certainty-view.ts';
import type { MapRow } from '../map-row.ts';
import table from './ranking-table.module.css';
import { ShareBar, SpanFigure } from './span-figure.tsx';
import styles from './sureness.module.css';

/** How sure the places of the list are; `view` is null while that is not known. */
export interface Sureness {
  view: CertaintyView | null;
  /** it is being worked out */
  waiting: boolean;
  /** of the steepest declines */
  k: number;
}

/** Rank span and probability of being among the k steepest declines, as two cells of a row. */
export function SurenessCells({ row, sureness: { view, waiting, k } }: { row: MapRow; sureness: Sureness }) {
  const span = view?.spans.get(row.code);
  const share = view && amongSteepest(view, row.code, k);
  const none = <span className={styles.none}>{waiting ? '…' : MISSING}</span>;
  return (
    <>
      <td className={table.span}>
        {view && span ? (
          <>
            <SpanFigure low={span.rankLow} high={span.rankHigh} rank={row.rank} places={view.places} />
            <span className={styles.figure}>{spanText(span.rankLow, span.rankHigh)}</span>
          </>
        ) : (
          none
        )}
      </td>
      <td className={table.among}>
        {share === null ? (
          none
        ) : (
          <>
            <span className={styles.probability}>{shareText(share)}</span>
            <ShareBar share={share} />
          </>
        )}
      </td>
    </>
  );
}

export const spanText = (low: number, high: number): string => (low === high ? String(low) : range(low, high));
