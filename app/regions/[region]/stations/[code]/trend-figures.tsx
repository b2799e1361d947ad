import {
  fixed,
  flow,
  flowIn,
  interval,
  MISSING,
  pValue,
  range,
  signed,
  significant,
  specific,
  UNIT_WORDS,
  type Units,
} from '@/app/components/format';
import type { RankingRow } from '@/lib/region/ranking-types';
import styles from './station-screen.module.css';

interface Props {
  row: RankingRow;
  units: Units;
  labelOf(year: number): string;
}

/** The figures that the verdict rests on. What does not exist is a dash. */
export function TrendFigures({ row, units, labelOf }: Props) {
  const unit = UNIT_WORDS[units].flow;
  const years =
    row.firstYear === null || row.lastYear === null ? 'none' : range(labelOf(row.firstYear), labelOf(row.lastYear));
  const slope = (value: number | null) => {
    const shown = flowIn(value, units);
    if (shown === null || shown === undefined) return MISSING;
    return `${shown > 0 ? '+' : ''}${significant(shown).replace(/^-/, '−')}`;
  };
  const slopeInterval =
    row.slopeLow === null || row.slopeHigh === null ? MISSING : range(slope(row.slopeLow), slope(row.slopeHigh));
  const figures: [string, string][] = [
    ['Usable years', `${fixed(row.yearsUsed)} (${years})`],
    ['Mean minimum', `${flow(row.meanMinimum, units)}`],
    ['per area', specific(row.meanMinimumSpecific, units)],
    ...(row.drying
      ? ([
          ['Days without flow, per decade', signed(row.zeroDaysPerDecade)],
          ['its 95 % interval', interval(row.zeroDaysLow, row.zeroDaysHigh)],
        ] as [string, string][])
      : ([
          [`Slope, ${unit} per decade`, slope(row.slopePerDecade)],
          ['its 95 % interval', slopeInterval],
          ['% of the mean per decade', signed(row.percentPerDecade)],
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
      <table>
        <tbody>
          {figures.map(([name, value]) => (
            <tr key={name}>
              <th scope="row">{name}</th>
              <td>{value}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </section>
  );
}
