import { fixed, interval, MISSING, pValue, range, significant } from '@/app/components/format';
import { ScrollFrame } from '@/app/components/scroll-frame';
import type { Segment, StationBreaks } from '@/lib/region/break-types';
import styles from '../station-screen.module.css';

interface Props {
  breaks: Pick<StationBreaks, 'steps'>;
  /** from the unit of what is compared to the one shown */
  factor: number;
  unit: string;
  labelOf(year: number): string;
  alpha: number;
}

/** Every break with the levels on its two sides, their difference with its interval, and the test. */
export function StepTable({ breaks: { steps }, factor, unit, labelOf, alpha }: Props) {
  if (steps.length === 0) return null;
  const scaled = (value: number | null) => (value === null ? null : value * factor);
  const withUnit = unit && `, ${unit}`;
  return (
    <ScrollFrame className={styles.scroll} label="Before and after as a table">
      <table>
        <thead>
          <tr>
            <th scope="col">Break</th>
            <th scope="col">Median before{withUnit}</th>
            <th scope="col">Median after{withUnit}</th>
            <th scope="col">Difference{withUnit}</th>
            <th scope="col">Difference, %</th>
            <th scope="col">p</th>
            <th scope="col">To know</th>
          </tr>
        </thead>
        <tbody>
          {steps.map((step) => (
            <tr key={step.break.year}>
              <th scope="row" className={styles.breakWords}>
                {step.break.words}
              </th>
              <Level segment={step.before} factor={factor} labelOf={labelOf} />
              <Level segment={step.after} factor={factor} labelOf={labelOf} />
              <td>
                <strong>{plus(scaled(step.difference))}</strong>
                <Quiet>{ends(scaled(step.low), scaled(step.high))}</Quiet>
              </td>
              <td>
                {step.percent === null ? MISSING : plus(step.percent, 2)}
                <Quiet>{interval(step.percentLow, step.percentHigh, 0)}</Quiet>
              </td>
              <td>
                {pValue(step.p)}
                {steps.length > 1 && <Quiet>adjusted {pValue(step.pAdjusted)}</Quiet>}
                <Quiet>{verdict(step.pAdjusted, step.difference, alpha)}</Quiet>
              </td>
              <td className={styles.words}>{step.warning || MISSING}</td>
            </tr>
          ))}
        </tbody>
      </table>
      <p className={styles.caption}>
        Difference: Hodges–Lehmann, after less before, with its 95 % interval. p: rank-sum test, its variance widened
        for carry-over from year to year, adjusted for as many breaks as are tested here.
      </p>
    </ScrollFrame>
  );
}

interface LevelProps {
  segment: Segment;
  factor: number;
  labelOf(year: number): string;
}

function Level({ segment: { median, first, last, years }, factor, labelOf }: LevelProps) {
  return (
    <td>
      {significant(median === null ? null : median * factor)}
      <Quiet>
        {range(labelOf(first), labelOf(last))}, {fixed(years)} years
      </Quiet>
    </td>
  );
}

function Quiet({ children }: { children: React.ReactNode }) {
  return <span className={styles.quiet}>{children}</span>;
}

function plus(value: number | null, figures = 3): string {
  return value !== null && value > 0 ? `+${significant(value, figures)}` : significant(value, figures);
}

function ends(low: number | null, high: number | null): string {
  return low === null || high === null ? MISSING : range(plus(low), plus(high));
}

function verdict(p: number | null, difference: number | null, alpha: number): string {
  if (p === null || difference === null) return '';
  if (p >= alpha) return 'may be chance';
  return difference < 0 ? 'lower after' : 'higher after';
}
