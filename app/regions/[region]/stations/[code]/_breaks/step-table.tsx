import { count, interval, MISSING, pValue, range, significant } from '@/app/components/format';
import { ScrollFrame } from '@/app/components/scroll-frame';
import type { Segment, StationBreaks } from '@/lib/region/break-types';
import { changeText, changeUnit, dateText, type IndexScale } from '../index-scale';
import styles from '../station-screen.module.css';

interface Props {
  breaks: Pick<StationBreaks, 'steps'>;
  scale: IndexScale;
  labelOf(year: number): string;
  alpha: number;
}

/** Every break with the levels on its two sides, their difference with its interval, and the test. */
export function StepTable({ breaks: { steps }, scale, labelOf, alpha }: Props) {
  if (steps.length === 0) return null;
  const withUnit = scale.unit && `, ${scale.unit}`;
  const changeIn = changeUnit(scale) && `, ${changeUnit(scale)}`;
  return (
    <ScrollFrame className={styles.scroll} label="Before and after as a table">
      <table>
        <thead>
          <tr>
            <th scope="col">Break</th>
            <th scope="col">Median before{withUnit}</th>
            <th scope="col">Median after{withUnit}</th>
            <th scope="col">Difference{changeIn}</th>
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
              <Level segment={step.before} scale={scale} labelOf={labelOf} />
              <Level segment={step.after} scale={scale} labelOf={labelOf} />
              <td>
                <strong>{changeText(step.difference, scale)}</strong>
                <Quiet>{ends(step.low, step.high, scale)}</Quiet>
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
  scale: IndexScale;
  labelOf(year: number): string;
}

function Level({ segment: { median, first, last, years }, scale, labelOf }: LevelProps) {
  return (
    <td>
      {scale.index === 'minimum-date' && median !== null
        ? dateText(median)
        : significant(median === null ? null : median * scale.factor)}
      <Quiet>
        {range(labelOf(first), labelOf(last))}, {count(years, 'year')}
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

function ends(low: number | null, high: number | null, scale: IndexScale): string {
  return low === null || high === null ? MISSING : range(changeText(low, scale), changeText(high, scale));
}

function verdict(p: number | null, difference: number | null, alpha: number): string {
  if (p === null || difference === null) return '';
  if (p >= alpha) return 'may be chance';
  return difference < 0 ? 'lower after' : 'higher after';
}
