import styles from './sparkline.module.css';

interface SparklineProps {
  /** the years on the axis, first and last; the same in every row, so that gaps and short records show */
  span: [number, number];
  years: ArrayLike<number>;
  /** minima as a ratio to their mean, one a year; NaN is no mark */
  ratios: ArrayLike<number>;
  /** % of the mean per decade with its interval, and the height of the line (ratio) at the middle of its years */
  line: { percent: number; low: number | null; high: number | null; middle: number } | null;
  side?: 'falling' | 'rising' | 'level';
  width?: number;
  height?: number;
}

/** The height of every figure: 0 to twice the station's mean minimum, so that tilts compare from row to row. */
const TOP_RATIO = 2;

/** Annual minima as dots on a real time axis, the slope as a line, its 95 % interval as the wedge about the line's
 *  middle. A value above the top is drawn as a small tick on it. Decoration: the row's figures say the same in words. */
export function Sparkline(props: SparklineProps) {
  const { span, years, ratios, line, side = 'level', width = 120, height = 32 } = props;
  const x = (year: number) => 2 + ((year - span[0]) / Math.max(1, span[1] - span[0])) * (width - 4);
  const y = (ratio: number) => height - 1.5 - (ratio / TOP_RATIO) * (height - 3);
  let dots = '';
  let above = '';
  for (let i = 0; i < years.length; i++) {
    if (!(ratios[i] >= 0)) continue;
    if (ratios[i] > TOP_RATIO) above += `M${x(years[i]).toFixed(1)} 0v2.5`;
    else dots += `M${x(years[i]).toFixed(1)} ${y(ratios[i]).toFixed(1)}h.01`;
  }
  return (
    <svg viewBox={`0 0 ${width} ${height}`} width={width} height={height} aria-hidden="true" className={styles.figure}>
      <path d={`M0 ${height - 0.5}H${width}`} className={styles.base} />
      {line && years.length > 1 && <SlopeLine line={line} years={years} x={x} y={y} side={side} />}
      <path d={dots} className={styles.dots} />
      {above && <path d={above} className={styles.above} />}
    </svg>
  );
}

interface SlopeLineProps {
  line: NonNullable<SparklineProps['line']>;
  years: ArrayLike<number>;
  x: (year: number) => number;
  y: (ratio: number) => number;
  side: NonNullable<SparklineProps['side']>;
}

function SlopeLine({ line, years, x, y, side }: SlopeLineProps) {
  const [first, last] = [years[0], years[years.length - 1]];
  const middleYear = (first + last) / 2;
  const at = (percent: number, year: number) => y(line.middle + (percent / 1000) * (year - middleYear));
  const point = (percent: number, year: number) => `${x(year).toFixed(1)} ${at(percent, year).toFixed(1)}`;
  const wedge =
    line.low !== null && line.high !== null
      ? `M${point(line.low, first)}L${point(line.high, last)}V${at(line.low, last).toFixed(1)}L${point(line.high, first)}Z`
      : null;
  return (
    <g className={styles[side]}>
      {wedge && <path d={wedge} className={styles.wedge} />}
      <path d={`M${point(line.percent, first)}L${point(line.percent, last)}`} className={styles.slope} />
    </g>
  );
}
