'use client';
import { scaleLinear, scaleLog } from 'd3-scale';
import { ChangeMarks } from '@/app/components/change-marks/change-marks';
import { type MarkedChange, placeChanges, tabsHeight } from '@/app/components/change-marks/marked-changes';
import { tickText } from '@/app/components/duration-figure/figure-text';
import { useWidth } from '@/app/components/use-width';
import { yearTicks } from '@/app/components/year-ticks';
import { dateOfDay, dayNumber } from '@/lib/calendar/day';
import type { BesideFlow, Columns } from '@/lib/jobs/beside-flow';
import styles from './beside-figure.module.css';
import { PLOT } from './plot-box';

interface Props extends BesideFlow {
  changes: readonly MarkedChange[];
  /** from m³/s to the unit shown */
  flowFactor: number;
  flowUnit: string;
  unitText: string;
  summary: string;
}

const PANEL = 96;
const FLOW_PANEL = 64;
const GAP = 14;

/** A whole daily record in two panels over one time axis, the flow below on a logarithmic axis. Each column reaches from
 *  the lowest to the highest value of its days, so that neither peaks nor lows are lost. */
export function BesideFigure(props: Props) {
  const { quantity, firstDay, lastDay, columns, flow, changes, flowFactor, flowUnit, unitText, summary } = props;
  const [frame, width] = useWidth<HTMLDivElement>(960);
  const right = Math.max(PLOT.left + 1, width - PLOT.right);
  const x = scaleLinear([firstDay, lastDay + 1], [PLOT.left, right]);
  const marks = placeChanges(changes, x, [PLOT.left, right]);
  const top = PLOT.top + tabsHeight(marks);
  const [low, high] = extent(columns, 1);
  // Depths of a day begin at zero; a level has no natural zero.
  const y = scaleLinear([quantity === 'stage' ? low : 0, high], [top + PANEL, top]).nice(3);
  const flowTop = top + PANEL + GAP;
  const bottom = flow ? flowTop + FLOW_PANEL : top + PANEL;
  const [flowLow, flowHigh] = flow ? extent(flow, flowFactor, 0) : [1, 10];
  const flowY = scaleLog([flowLow, Math.max(flowHigh, flowLow * 2)], [bottom, flowTop]);
  const years = yearTicks(dateOfDay(firstDay).year + 1, dateOfDay(lastDay).year, right - PLOT.left);

  return (
    <div ref={frame} className={styles.frame}>
      <svg width={width} height={bottom + 24} role="img" aria-label={summary}>
        {y.ticks(3).map((value) => (
          <Tick key={value} y={y(value)} right={right} text={tickText(value)} />
        ))}
        <path className={styles.values} d={envelope(columns, right, y)} />
        {flow && (
          <>
            {decades(flowLow, flowHigh).map((value) => (
              <Tick key={value} y={flowY(value)} right={right} text={tickText(value)} />
            ))}
            <path
              className={styles.flow}
              d={envelope(flow, right, (value) => flowY(Math.max(flowLow, value * flowFactor)))}
            />
          </>
        )}
        {years.map((year) => (
          <g key={year} className={styles.years}>
            <line x1={x(dayNumber(year, 1, 1))} x2={x(dayNumber(year, 1, 1))} y1={bottom} y2={bottom + 4} />
            <text x={x(dayNumber(year, 1, 1))} y={bottom + 18} textAnchor="middle">
              {year}
            </text>
          </g>
        ))}
        <ChangeMarks changes={marks} top={PLOT.top - 12} bottom={bottom} />
      </svg>
      {flow && (
        <p className={styles.names}>
          Above: {unitText}. Below: flow of the same days, {flowUnit}, logarithmic.
        </p>
      )}
    </div>
  );
}

function Tick({ y, right, text }: { y: number; right: number; text: string }) {
  return (
    <g className={styles.grid}>
      <line x1={PLOT.left} x2={right} y1={y} y2={y} />
      <text x={PLOT.left - 8} y={y} dy="0.32em" textAnchor="end">
        {text}
      </text>
    </g>
  );
}

/** Lowest and highest value, times a factor, of those above `floor`. */
function extent({ low, high }: Columns, factor: number, floor = Number.NEGATIVE_INFINITY): [number, number] {
  const values = [...low, ...high].flatMap((value) => (value === null || value <= floor ? [] : [value * factor]));
  if (values.length === 0) return [1, 10];
  return [values.reduce((a, b) => Math.min(a, b)), values.reduce((a, b) => Math.max(a, b))];
}

/** One upright stroke a column, at least a pixel tall, as a single path. */
function envelope({ low, high }: Columns, right: number, y: (value: number) => number): string {
  const step = (right - PLOT.left) / low.length;
  return low
    .map((value, column) => {
      const most = high[column];
      if (value === null || most === null) return '';
      const [from, to] = [y(value), y(most)];
      return `M${(PLOT.left + (column + 0.5) * step).toFixed(1)},${(from + 0.5).toFixed(1)}V${(Math.min(to, from) - 0.5).toFixed(1)}`;
    })
    .join('');
}

/** Powers of ten between two flows; where there are fewer than two, 1, 2 and 5 times them. */
function decades(low: number, high: number): number[] {
  const between = (factors: readonly number[]) => {
    const found: number[] = [];
    for (let power = Math.floor(Math.log10(low)); power <= Math.log10(high); power += 1) {
      for (const factor of factors) {
        const value = Number((factor * 10 ** power).toPrecision(3));
        if (value >= low && value <= high) found.push(value);
      }
    }
    return found;
  };
  const whole = between([1]);
  return whole.length > 1 ? whole : between([1, 2, 5]);
}
