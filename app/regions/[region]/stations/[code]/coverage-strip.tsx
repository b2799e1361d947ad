'use client';
import { scaleLinear } from 'd3-scale';
import { useRouter, useSearchParams } from 'next/navigation';
import { ChangeMarks } from '@/app/components/change-marks/change-marks';
import {
  type MarkedChange,
  placeChanges,
  tabsHeight,
  yearPosition,
} from '@/app/components/change-marks/marked-changes';
import { yearHref } from '@/app/components/links';
import { useWidth } from '@/app/components/use-width';
import { yearTicks } from '@/app/components/year-ticks';
import type { YearCoverage } from '@/lib/jobs/types';
import styles from './coverage-strip.module.css';
import { coverageText } from './coverage-text';
import { PLOT } from './plot-box';
import { useYearReader } from './year-reader';
import { YearSlider } from './year-slider';

interface Props {
  /** region and station, for the way to a year's days */
  slug: string;
  code: string;
  changes: readonly MarkedChange[];
  /** month in which the low-flow year begins */
  yearStart: number;
  years: (YearCoverage & { label: string })[];
  /** first and last year of the axis, shared with the figure of the minima above */
  span: [number, number];
  summary: string;
}

const BAR = 44;
const TOP = 4;

/** One bar a year, as tall as the share of its days that have a value: dark where the year counts, light where it does
 *  not, hatched for provisional days, a cross on the base line where there is nothing. A click or Enter opens the year's
 *  days on the Records page. */
export function CoverageStrip({ slug, code, years, changes, yearStart, span, summary }: Props) {
  const router = useRouter();
  const query = useSearchParams();
  const [frame, width] = useWidth<HTMLDivElement>(960);
  const x = scaleLinear([span[0] - 0.7, span[1] + 0.7], [PLOT.left, Math.max(PLOT.left + 1, width - PLOT.right)]);
  const reader = useYearReader(years.map((year) => year.year));
  const current = years.find((year) => year.year === reader.picked) ?? null;
  const open = () => {
    if (current) router.push(yearHref(slug, code, current.year, query));
  };
  const barWidth = Math.max(1.5, (x(1) - x(0)) * 0.78);
  const marks = placeChanges(changes, (day) => x(yearPosition(day, yearStart)), [PLOT.left, width - PLOT.right]);
  const top = TOP + tabsHeight(marks);
  const base = top + BAR;

  return (
    <div ref={frame} className={styles.frame}>
      <YearSlider
        label={summary}
        span={span}
        year={current?.year ?? null}
        text={current && coverageText(current)}
        className={styles.strip}
        yearAt={x.invert}
        onYear={reader.pickNearest}
        onKeyDown={(event) => (event.key === 'Enter' ? open() : reader.onKeyDown(event))}
        onOpen={open}
        onLeave={reader.clear}
      >
        <svg width={width} height={base + 28} aria-hidden="true">
          <Hatch />
          <line className={styles.full} x1={PLOT.left} x2={width - PLOT.right} y1={top} y2={top} />
          <text className={styles.axis} x={PLOT.left - 8} y={top} dy="0.6em" textAnchor="end">
            all days
          </text>
          {years.map((year) => (
            <Bar key={year.year} year={year} x={x(year.year)} width={barWidth} base={base} picked={year === current} />
          ))}
          <ChangeMarks changes={marks} top={TOP} bottom={base} />
          <line className={styles.base} x1={PLOT.left} x2={width - PLOT.right} y1={base} y2={base} />
          {yearTicks(span[0], span[1], width - PLOT.left - PLOT.right).map((year) => (
            <text key={year} className={styles.axis} x={x(year)} y={base + 18} textAnchor="middle">
              {year}
            </text>
          ))}
        </svg>
      </YearSlider>
      <div className={styles.readout}>{current ? coverageText(current) : <Key years={years} />}</div>
    </div>
  );
}

function Hatch() {
  return (
    <defs>
      <pattern id="coverage-hatch" width="4" height="4" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
        <rect width="4" height="4" className={styles.hatchGround} />
        <line x1="0" y1="0" x2="0" y2="4" className={styles.hatchLine} />
      </pattern>
    </defs>
  );
}

interface BarProps {
  year: YearCoverage;
  x: number;
  width: number;
  base: number;
  picked: boolean;
}

function Bar({ year, x, width, base, picked }: BarProps) {
  const valued = year.days - year.missingDays;
  if (valued <= 0) return <path className={styles.absent} d={`M${x - 2.5},${base - 6}l5,5m0,-5l-5,5`} />;
  const height = (valued / year.days) * BAR;
  const provisional = (Math.min(valued, year.flagged.provisional) / year.days) * BAR;
  return (
    <g data-picked={picked || undefined} className={styles.bar}>
      <rect
        className={year.state === 'usable' ? styles.usable : styles.partial}
        x={x - width / 2}
        y={base - height}
        width={width}
        height={height}
      />
      {provisional > 0 && (
        <rect fill="url(#coverage-hatch)" x={x - width / 2} y={base - height} width={width} height={provisional} />
      )}
    </g>
  );
}

function Key({ years }: { years: readonly YearCoverage[] }) {
  const items = [
    { show: years.some((year) => year.state === 'usable'), look: styles.usable, text: 'the year counts' },
    { show: years.some((year) => year.state === 'partial'), look: styles.partial, text: 'does not count' },
    {
      show: years.some((year) => year.flagged.provisional > 0),
      fill: 'url(#coverage-hatch)',
      text: 'provisional days',
    },
  ];
  return (
    <span className={styles.key}>
      {items
        .filter((item) => item.show)
        .map((item) => (
          <span key={item.text}>
            <svg width="12" height="12" aria-hidden="true">
              <rect width="12" height="12" className={item.look} fill={item.fill} />
            </svg>{' '}
            {item.text}
          </span>
        ))}
      {years.some((year) => year.state === 'missing') && (
        <span>
          <svg width="12" height="12" aria-hidden="true">
            <path className={styles.absent} d="M3,3l6,6m0,-6l-6,6" />
          </svg>{' '}
          no values
        </span>
      )}
      <span>a click or Enter opens a year’s days</span>
    </span>
  );
}
