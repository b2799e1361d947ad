import Link from 'next/link';
import { NAMED_EXCEEDANCES } from '@/app/components/duration-figure/axes';
import type { FigureBand } from '@/app/components/duration-figure/duration-figure';
import { exceedanceText } from '@/app/components/duration-figure/figure-text';
import { LineSwatch } from '@/app/components/duration-figure/line-swatch';
import { fixed, significant } from '@/app/components/format';
import { ScrollFrame } from '@/app/components/scroll-frame';
import type { CurveKind } from '@/lib/jobs/types';
import type { ShownCurve } from './curves-screen';
import styles from './curves-screen.module.css';

interface Props {
  exceedances: readonly number[];
  curves: readonly ShownCurve[];
  /** how many of the curves are labelled lines */
  lines: number;
  band: FigureBand;
  unit: string;
  kind: CurveKind;
}

/** Flows at the exceedances that people name: Q95 is the flow reached or passed 95 % of the time. */
export function CurvesTable({ exceedances, curves, lines, band, unit, kind }: Props) {
  const columns = NAMED_EXCEEDANCES.map((exceedance) => ({
    exceedance,
    at: exceedances.findIndex((other) => Math.abs(other - exceedance) < 1e-9),
  }));
  const bandRows = [
    { name: 'Region, 90th percentile', flows: band.p90 },
    { name: 'Region, median', flows: band.p50 },
    { name: 'Region, 10th percentile', flows: band.p10 },
  ];
  return (
    <ScrollFrame className={styles.tableFrame} label="Flows at named exceedances">
      <table className={styles.table}>
        <caption>
          Flow reached or passed in the given share of {kind === 'period' ? 'all days' : 'the median year'}, {unit}
        </caption>
        <thead>
          <tr>
            <th scope="col">Station</th>
            {columns.map(({ exceedance }) => (
              <th key={exceedance} scope="col" title={`reached or passed ${exceedanceText(exceedance)} % of the time`}>
                Q{exceedanceText(exceedance)}
              </th>
            ))}
            <th scope="col">Years</th>
            <th scope="col">Days</th>
          </tr>
        </thead>
        <tbody>
          {curves.map((curve, index) => (
            <tr key={curve.code}>
              <th scope="row">
                {index < lines && (
                  <span className={styles.lineKey}>
                    {index + 1}
                    <LineSwatch index={index} />
                  </span>
                )}
                <Link href={curve.href} prefetch={false}>
                  {curve.name}
                </Link>
              </th>
              {columns.map(({ exceedance, at }) => (
                <td key={exceedance}>{significant(curve.flows[at])}</td>
              ))}
              <td>{fixed(curve.years)}</td>
              <td>{fixed(curve.days)}</td>
            </tr>
          ))}
        </tbody>
        <tbody className={styles.bandRows}>
          {bandRows.map((row) => (
            <tr key={row.name}>
              <th scope="row">{row.name}</th>
              {columns.map(({ exceedance, at }) => (
                <td key={exceedance}>{significant(row.flows[at])}</td>
              ))}
              <td />
              <td />
            </tr>
          ))}
        </tbody>
      </table>
    </ScrollFrame>
  );
}
