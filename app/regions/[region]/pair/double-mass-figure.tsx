'use client';
import { scaleLinear } from 'd3-scale';
import { tickText } from '@/app/components/duration-figure/figure-text';
import { useWidth } from '@/app/components/use-width';
import type { PairYear } from '@/lib/region/pair-types';
import { FootAxis, ValueAxis } from '../stations/[code]/plot-axes';
import { PLOT } from '../stations/[code]/plot-box';
import { ByArrowKeys, YearFigure } from '../stations/[code]/year-figure';
import { useYearReader } from '../stations/[code]/year-reader';
import styles from './pair-figures.module.css';

interface Props {
  years: readonly Pick<PairYear, 'year' | 'stationSum' | 'referenceSum'>[];
  summary: string;
}

const HEIGHT = 320;

/** Pixels between two years that are written beside the curve, at least. */
const LABEL_EVERY = 46;

/** Sums of the station over sums of the reference: a straight line while nothing changes at one of the two alone, a bend
 *  where something does. Arrow keys move through the years. */
export function DoubleMassFigure({ years, summary }: Props) {
  const [frame, width] = useWidth<HTMLDivElement>(760);
  const right = Math.max(PLOT.left + 1, width - PLOT.right);
  const bottom = HEIGHT - PLOT.bottom;
  const last = years[years.length - 1];
  const x = scaleLinear([0, Math.max(last.referenceSum, last.stationSum)], [PLOT.left, right]).nice(5);
  const y = scaleLinear(x.domain(), [bottom, PLOT.top]);
  const reader = useYearReader(years.map(({ year }) => year));
  const current = years.find(({ year }) => year === reader.picked) ?? null;
  const nearest = (pixels: number) =>
    years.reduce((best, each) =>
      Math.abs(x(each.referenceSum) - pixels) < Math.abs(x(best.referenceSum) - pixels) ? each : best,
    ).year;
  const text = current && readingOf(current);

  return (
    <YearFigure
      {...{ frame, width, summary, reader }}
      height={HEIGHT}
      axisName="Upwards: sum of the station. To the right: sum of the reference. Both in ordinary years"
      span={[years[0].year, last.year]}
      text={text}
      yearAt={nearest}
      meaning={
        <>
          Dashed: as it would be had the ratio never changed. A bend is where it did. <ByArrowKeys />
        </>
      }
    >
      <ValueAxis ticks={y.ticks(5).map((value) => ({ value, text: tickText(value) }))} y={y} right={right} />
      <FootAxis values={x.ticks(5)} x={x} bottom={bottom} textOf={tickText} />
      <line className={styles.level} x1={x(0)} y1={y(0)} x2={x(last.referenceSum)} y2={y(last.stationSum)} />
      <path
        className={styles.joined}
        d={`M${x(0)},${y(0)}${years.map(({ referenceSum, stationSum }) => `L${x(referenceSum).toFixed(1)},${y(stationSum).toFixed(1)}`).join('')}`}
      />
      {years.map(({ year, referenceSum, stationSum }) => (
        <circle
          key={year}
          className={styles.point}
          cx={x(referenceSum)}
          cy={y(stationSum)}
          r={year === current?.year ? 5 : 3}
        />
      ))}
      {labelled(years, ({ referenceSum }) => x(referenceSum)).map(({ year, referenceSum, stationSum }) => (
        <text key={year} x={x(referenceSum) + 7} y={y(stationSum) + 13}>
          {year}
        </text>
      ))}
    </YearFigure>
  );
}

const readingOf = ({ year, stationSum, referenceSum }: Props['years'][number]): string =>
  `${year}: up to here the station has had ${stationSum.toFixed(1)} of its ordinary years, the reference ${referenceSum.toFixed(1)}.`;

/** Years far enough apart to be written beside the curve, the first among them. */
function labelled(years: Props['years'], xOf: (year: Props['years'][number]) => number): Props['years'][number][] {
  let at = Number.NEGATIVE_INFINITY;
  return years.filter((each, i) => {
    const here = xOf(each);
    // the last label would run out of the frame
    if (here - at < LABEL_EVERY || i === years.length - 1) return false;
    at = here;
    return true;
  });
}
