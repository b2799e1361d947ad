'use client';
import { scaleLinear } from 'd3-scale';
import { tickText } from '@/app/components/duration-figure/figure-text';
import { significant } from '@/app/components/format';
import { useWidth } from '@/app/components/use-width';
import type { WeatherYear } from '@/lib/region/pair-types';
import { FootAxis, ValueAxis } from '../stations/[code]/plot-axes';
import { PLOT } from '../stations/[code]/plot-box';
import { ByArrowKeys, YearFigure } from '../stations/[code]/year-figure';
import { useYearReader } from '../stations/[code]/year-reader';
import styles from './pair-figures.module.css';

interface Props {
  years: readonly WeatherYear[];
  /** from m³/s to the unit shown */
  factor: number;
  unit: string;
  /** Example: "rainfall of the 180 days before, mm" */
  weatherName: string;
  minimumName: string;
  summary: string;
}

const HEIGHT = 300;

/** Each year's minimum over the weather before it, and the curve of what such weather usually leaves. Earlier half of the
 *  years hollow, later half full: where the full ones lie lower, the river gives less for the same weather. */
export function WeatherFigure({ years, factor, unit, weatherName, minimumName, summary }: Props) {
  const [frame, width] = useWidth<HTMLDivElement>(760);
  const right = Math.max(PLOT.left + 1, width - PLOT.right);
  const bottom = HEIGHT - PLOT.bottom;
  const weather = years.map((each) => each.weather);
  const flows = years.flatMap(({ minimum, fitted }) => [minimum * factor, fitted * factor]);
  const x = scaleLinear([Math.min(...weather), Math.max(...weather)], [PLOT.left, right]).nice(5);
  const y = scaleLinear([Math.min(0, ...flows), Math.max(...flows)], [bottom, PLOT.top]).nice(5);
  const curve = [...years].sort((a, b) => a.weather - b.weather);
  const middle = years[Math.floor(years.length / 2)].year;
  const reader = useYearReader(years.map(({ year }) => year));
  const current = years.find(({ year }) => year === reader.picked) ?? null;
  const nearest = (pixels: number) =>
    years.reduce((best, each) =>
      Math.abs(x(each.weather) - pixels) < Math.abs(x(best.weather) - pixels) ? each : best,
    ).year;
  const text =
    current &&
    `${current.year}: ${significant(current.minimum * factor)} ${unit} after ${Math.round(current.weather)} mm, which usually leaves ${significant(current.fitted * factor)} ${unit}.`;

  return (
    <YearFigure
      {...{ frame, width, summary, reader }}
      height={HEIGHT}
      axisName={`Upwards: ${minimumName}, ${unit}. To the right: ${weatherName}`}
      span={[years[0].year, years[years.length - 1].year]}
      text={text}
      yearAt={nearest}
      meaning={
        <>
          Hollow: years before {middle}. Full: {middle} and later. Line: what such weather usually leaves.{' '}
          <ByArrowKeys />
        </>
      }
    >
      <ValueAxis ticks={y.ticks(5).map((value) => ({ value, text: tickText(value) }))} y={y} right={right} />
      <FootAxis
        values={x.ticks(Math.max(2, Math.floor((right - PLOT.left) / 90)))}
        x={x}
        bottom={bottom}
        textOf={tickText}
      />
      <path
        className={styles.curve}
        d={`M${curve.map(({ weather, fitted }) => `${x(weather).toFixed(1)},${y(fitted * factor).toFixed(1)}`).join('L')}`}
      />
      {current && (
        <line className={styles.cursor} x1={x(current.weather)} x2={x(current.weather)} y1={PLOT.top} y2={bottom} />
      )}
      {years.map(({ year, weather, minimum }) => (
        <circle
          key={year}
          className={year < middle ? styles.faint : styles.point}
          cx={x(weather)}
          cy={y(minimum * factor)}
          r={year === current?.year ? 5 : 3.5}
        />
      ))}
    </YearFigure>
  );
}
