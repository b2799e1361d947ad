import Link from 'next/link';
import { memo } from 'react';
import { areaNumber, fixed, pValue, shareText, type Units } from '@/app/components/format';
import { IntervalFigure, type IntervalScale } from '@/app/components/interval-figure';
import { needleOf } from '@/app/components/needle';
import { decodeRatios } from '@/app/components/spark-code';
import { Sparkline } from '@/app/components/sparkline';
import type { AnnualIndexName } from '@/lib/basis';
import { type HoverStore, useIsHovered } from '../hover-store.ts';
import type { MapRow } from '../map-row.ts';
import { type FigureWords, trendWords } from './figure-words.ts';
import { nameLines } from './name-lines.ts';
import styles from './ranking-table.module.css';
import { type Sureness, SurenessCells, spanText } from './sureness-cells.tsx';

interface StationRowProps {
  row: MapRow;
  /** place in the list, from 0 */
  at: number;
  /** what is compared */
  index: AnnualIndexName;
  href: string;
  selected: boolean;
  /** the one row whose link the Tab key reaches */
  tabbable: boolean;
  hover: HoverStore;
  words: FigureWords;
  /** null where the figure has no interval */
  scale: IntervalScale | null;
  span: [number, number];
  units: Units;
  /** null for a list without places */
  sureness: Sureness | null;
  /** how far its place moved against the region's own terms; null where there is nothing to compare */
  moved: Moved | null;
  /** the trend that the record would have shown; null where that is not known or not of interest */
  detectable: string | null;
}

/** Places up (steeper decline) from the place on the region's own terms; null where it is not ranked there. */
export interface Moved {
  places: number | null;
  before: number | null;
}

/** One ranked or drying station: figures in the row, words under the figures. */
export const StationRow = memo(function StationRow(props: StationRowProps) {
  const { row, at, index, href, selected, tabbable, hover, words, scale, span, units } = props;
  const { sureness, moved, detectable } = props;
  const placeSpan = sureness?.view?.spans.get(row.code);
  const hovered = useIsHovered(hover, row.code);
  const { side, significant } = needleOf(row);
  const [head, tail] = nameLines(row.name);
  const ratios = decodeRatios(row.spark);
  const years = Int32Array.from(ratios, (_, i) => row.sparkFirst + i);
  const tone = significant ? styles[side] : undefined;
  return (
    <tr
      aria-rowindex={at + 2}
      data-code={row.code}
      data-hovered={hovered || undefined}
      data-selected={selected || undefined}
      className={styles.row}
    >
      <td className={styles.rank}>
        {row.rank ?? ''}
        {placeSpan && <span className={styles.spanText}>{spanText(placeSpan.rankLow, placeSpan.rankHigh)}</span>}
        {moved && <MovedMark {...moved} />}
      </td>
      <th scope="row" className={styles.station}>
        <Link href={href} prefetch={false} tabIndex={tabbable ? 0 : -1} aria-current={selected || undefined}>
          <span className={styles.head}>{head}</span>{' '}
          <span className={styles.sub}>
            {tail}
            <span className={tail ? styles.code : undefined}>
              {tail && ' · '}
              {row.code}
            </span>
            {row.note && (
              <span aria-hidden="true" title={row.note}>
                {' '}
                · note
              </span>
            )}
          </span>
        </Link>
      </th>
      <td className={styles.area}>{areaNumber(row.areaKm2, units)}</td>
      <td className={styles.years}>{fixed(row.yearsUsed)}</td>
      <td className={styles.minima}>
        <Sparkline span={span} years={years} ratios={ratios} line={row.line} side={significant ? side : 'level'} />
      </td>
      <td className={styles.change}>
        <span className={`${styles.figure} ${tone ?? ''}`}>{words.text(row.figure.value)}</span>
        <span className={styles.trend}>
          {row.trend && (
            <span className={significant ? `${styles.sure} ${tone}` : undefined}>{trendWords(row.trend, index)}</span>
          )}
          <span className={styles.p}>
            {row.trend && ', '}p {pValue(row.pAdjusted)}
          </span>
        </span>
      </td>
      {scale && (
        <td className={styles.interval}>
          <span className="visually-hidden">{words.spoken(row)}</span>
          <IntervalFigure
            scale={scale}
            value={words.shown(row.figure.value)}
            low={words.shown(row.figure.low)}
            high={words.shown(row.figure.high)}
            significant={significant}
            side={side}
            height={detectable ? 20 : undefined}
          />
          {detectable && <span className={styles.detectable}>detectable {detectable}</span>}
        </td>
      )}
      {sureness && <SurenessCells row={row} sureness={sureness} />}
      <td className={styles.steady}>{shareText(row.steadiness)}</td>
    </tr>
  );
});

/** Under a place: how many places further up or down it stands than on the region's own terms. */
function MovedMark({ places, before }: Moved) {
  if (places === null || before === null) {
    return (
      <span className={styles.moved}>
        new<span className="visually-hidden">: not ranked on the region’s own terms</span>
      </span>
    );
  }
  if (places === 0) return null;
  return (
    <span className={styles.moved}>
      <span aria-hidden="true">
        {places > 0 ? '▲' : '▼'} {Math.abs(places)}
      </span>
      <span className="visually-hidden">
        , {Math.abs(places)} {places > 0 ? 'up' : 'down'} from {before} on the region’s own terms
      </span>
    </span>
  );
}
