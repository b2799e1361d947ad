import { significant } from '../format.ts';
import type { FigureBand, FigureCurve } from './duration-figure';
import styles from './duration-figure.module.css';
import { exceedanceText } from './figure-text.ts';
import { LineSwatch } from './line-swatch';

interface Props {
  exceedance: number;
  index: number;
  lines: readonly FigureCurve[];
  band: FigureBand | null;
  near: string | null;
}

/** Every curve's flow at one exceedance, the largest first, and the region's band below. */
export function CurveReadout({ exceedance, index, lines, band, near }: Props) {
  const rows = lines
    .map((line, number) => ({ ...line, number, flow: line.flows[index] }))
    .sort((a, b) => (b.flow ?? -1) - (a.flow ?? -1));
  return (
    <div className={styles.readout}>
      <strong>{exceedanceText(exceedance)} % of the time</strong>
      <table>
        <tbody>
          {rows.map((row) => (
            <tr key={row.code} data-near={near === row.code || undefined}>
              <td>
                <LineSwatch index={row.number} />
              </td>
              <th scope="row">{row.name}</th>
              <td>{row.flow === null ? 'beyond record' : significant(row.flow)}</td>
            </tr>
          ))}
          {band && band.p50[index] !== null && (
            <tr className={styles.readoutBand}>
              <td />
              <th scope="row">Region, median (10–90 %)</th>
              <td>
                {significant(band.p50[index])} ({bound(band.p10[index])}–{bound(band.p90[index])})
              </td>
            </tr>
          )}
        </tbody>
      </table>
    </div>
  );
}

const bound = (flow: number | null): string => (flow === null ? '…' : significant(flow));
