import { interval, pValue, signed } from '@/app/components/format';
import { ScrollFrame } from '@/app/components/scroll-frame';
import type { PairTrend } from '@/lib/region/pair-types';
import styles from './pair-screen.module.css';

/** Trends side by side, in percent of each series' mean per decade. */
export function TrendTable({ label, rows }: { label: string; rows: { name: string; trend: PairTrend | null }[] }) {
  return (
    <ScrollFrame className={styles.scroll} label={label}>
      <table>
        <thead>
          <tr>
            <th scope="col">Trend of</th>
            <th scope="col">% per decade</th>
            <th scope="col">95 % interval</th>
            <th scope="col">Kendall’s tau</th>
            <th scope="col">p</th>
            <th scope="col">Lag-1 correlation</th>
          </tr>
        </thead>
        <tbody>
          {rows.map(({ name, trend }) => (
            <tr key={name}>
              <th scope="row">{name}</th>
              <td>{signed(trend?.percentPerDecade, 1)}</td>
              <td>{interval(trend?.percentLow, trend?.percentHigh)}</td>
              <td>{signed(trend?.tau, 2)}</td>
              <td>{pValue(trend?.p)}</td>
              <td>{signed(trend?.r1, 2)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </ScrollFrame>
  );
}
