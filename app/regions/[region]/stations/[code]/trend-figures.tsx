import { fixed, flow, interval, MISSING, pValue, range, signed, specific, type Units } from '@/app/components/format';
import { INDEX_FACTS } from '@/lib/region/index-facts';
import { INDEX_WORDS } from '@/lib/region/index-words';
import type { RankingRow } from '@/lib/region/ranking-types';
import { FigureTable } from './figure-table.tsx';
import { changeText, changeUnit, type IndexScale, valueText } from './index-scale.ts';
import styles from './station-screen.module.css';

interface Props {
  row: RankingRow;
  units: Units;
  /** of what is compared */
  scale: IndexScale;
  labelOf(year: number): string;
}

/** The figures that the verdict rests on. What does not exist is a dash. */
export function TrendFigures({ row, units, scale, labelOf }: Props) {
  const unit = changeUnit(scale);
  const { mean } = INDEX_WORDS[scale.index];
  const years =
    row.firstYear === null || row.lastYear === null ? 'none' : range(labelOf(row.firstYear), labelOf(row.lastYear));
  const slope = (value: number | null) => changeText(value, scale);
  const slopeInterval =
    row.valueSlopeLow === null || row.valueSlopeHigh === null
      ? MISSING
      : range(slope(row.valueSlopeLow), slope(row.valueSlopeHigh));
  const compared: [string, string][] =
    scale.index === 'minimum' || row.drying
      ? []
      : [[capitalised(mean), row.meanValue === null ? MISSING : valueText(row.meanValue, scale)]];
  const figures: [string, string][] = [
    ['Usable years', `${fixed(row.yearsUsed)} (${years})`],
    ...compared,
    ['Mean minimum', `${flow(row.meanMinimum, units)}`],
    ['per area', specific(row.meanMinimumSpecific, units)],
    ...(row.drying
      ? ([
          ['Days without flow, per decade', signed(row.zeroDaysPerDecade)],
          ['its 95 % interval', interval(row.zeroDaysLow, row.zeroDaysHigh)],
        ] as [string, string][])
      : ([
          [unit ? `Slope, ${unit} per decade` : 'Slope per decade', slope(row.valueSlope)],
          ['its 95 % interval', slopeInterval],
          ...(INDEX_FACTS[scale.index].hasPercent ? [['% of the mean per decade', signed(row.percentPerDecade)]] : []),
        ] as [string, string][])),
    ['Kendall’s tau', signed(row.tau, 2)],
    ['p, this station alone', pValue(row.p)],
    ['p, adjusted for the region', pValue(row.pAdjusted)],
    ['Lag-1 correlation', signed(row.r1, 2)],
    ['Years with a minimum of 0', fixed(row.zeroFlowYears)],
  ];
  return (
    <section className={styles.trend} aria-labelledby="trend-title">
      <h2 id="trend-title">Figures of the trend</h2>
      {row.unrankedReason && <p className={styles.reason}>Not ranked: {row.unrankedReason}.</p>}
      <FigureTable figures={figures} />
    </section>
  );
}

const capitalised = (words: string): string => words[0].toUpperCase() + words.slice(1);
