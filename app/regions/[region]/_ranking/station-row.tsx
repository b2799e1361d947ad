import Link from 'next/link';
import { memo } from 'react';
import { areaNumber, fixed, pValue, type Units } from '@/app/components/format';
import { IntervalFigure, type IntervalScale } from '@/app/components/interval-figure';
import { needleOf } from '@/app/components/needle';
import { decodeRatios } from '@/app/components/spark-code';
import { Sparkline } from '@/app/components/sparkline';
import { type HoverStore, useIsHovered } from '../hover-store.ts';
import type { MapRow } from '../map-row.ts';
import { type FigureWords, trendWords } from './figure-words.ts';
import { nameLines } from './name-lines.ts';
import styles from './ranking-table.module.css';

interface StationRowProps {
  row: MapRow;
  /** place in the list, from 0 */
  index: number;
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
}

/** One ranked or drying station: figures in the row, words under the figures. */
export const StationRow = memo(function StationRow(props: StationRowProps) {
  const { row, index, href, selected, tabbable, hover, words, scale, span, units } = props;
  const hovered = useIsHovered(hover, row.code);
  const { side, significant } = needleOf(row);
  const [head, tail] = nameLines(row.name);
  const ratios = decodeRatios(row.spark);
  const years = Int32Array.from(ratios, (_, i) => row.sparkFirst + i);
  const tone = significant ? styles[side] : undefined;
  return (
    <tr
      aria-rowindex={index + 2}
      data-code={row.code}
      data-hovered={hovered || undefined}
      data-selected={selected || undefined}
      className={styles.row}
    >
      <td className={styles.rank}>{row.rank ?? ''}</td>
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
            <span className={significant ? `${styles.sure} ${tone}` : undefined}>{trendWords[row.trend]}</span>
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
          />
        </td>
      )}
    </tr>
  );
});
