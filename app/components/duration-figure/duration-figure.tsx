'use client';
import { useRouter } from 'next/navigation';
import { type PointerEvent, useMemo, useState } from 'react';
import { Area, CartesianGrid, ComposedChart, Line, Tooltip, XAxis, YAxis } from 'recharts';
import { useWidth } from '../use-width';
import type { ExceedanceAxis, FlowAxis } from './axes.ts';
import { CurveReadout } from './curve-readout';
import styles from './duration-figure.module.css';
import { EndLabels } from './end-labels';
import { exceedanceText, tickText } from './figure-text.ts';
import { FlowLevels } from './flow-levels';
import { layOut } from './lay-out';
import { lineLook } from './line-looks';
import { nearestCurve } from './nearest-curve';
import { ThinCurves } from './thin-curves';

/** A station's curve as the figure draws it: flows at the figure's exceedances, null where the record gives none. */
export interface FigureCurve {
  code: string;
  name: string;
  flows: readonly (number | null)[];
  href: string;
}

export interface FigureBand {
  p10: readonly (number | null)[];
  p50: readonly (number | null)[];
  p90: readonly (number | null)[];
}

export interface FigureLevel {
  label: string;
  flow: number;
}

interface Props {
  exceedances: readonly number[];
  /** at most 12, each with a label at its end */
  lines: readonly FigureCurve[];
  /** the others, thin and without a label */
  thin?: readonly FigureCurve[];
  band: FigureBand | null;
  /** flows with a name, in the unit of the axis: a line across the figure each, where it is in range */
  levels?: readonly FigureLevel[];
  /** what the flow axis shows, with its unit */
  flowLabel: string;
  x: ExceedanceAxis;
  y: FlowAxis;
  height?: number;
  /** what the figure shows, for those who cannot see it */
  summary: string;
}

/** Reach of a click or a pointer about a curve, in pixels. */
const REACH = 10;

/** Duration curves over the region's band. Hover reads every curve at that exceedance; a click opens the station. */
export function DurationFigure({
  exceedances,
  lines,
  thin = [],
  band,
  levels = [],
  flowLabel,
  x,
  y,
  height = 480,
  summary,
}: Props) {
  const router = useRouter();
  const [frame, width, measured] = useWidth<HTMLDivElement>(960);
  const [near, setNear] = useState<string | null>(null);
  const plan = useMemo(
    () => layOut({ exceedances, lines, thin, band, x, y, width, height }),
    [exceedances, lines, thin, band, x, y, width, height],
  );
  const { plot, flow, xTicks, xDomain } = plan;

  const curveAt = (event: PointerEvent<HTMLDivElement>) => {
    const box = event.currentTarget.getBoundingClientRect();
    return nearestCurve(plan.pixels, plan.xs, { x: event.clientX - box.left, y: event.clientY - box.top }, REACH);
  };
  const open = (code: string | null) => {
    const curve = [...lines, ...thin].find((candidate) => candidate.code === code);
    if (curve) router.push(curve.href);
  };
  const labelOf = (ticks: typeof xTicks, print: (value: number) => string) => (at: number) => {
    const value = ticks.find((tick) => tick.at === at)?.value;
    return value === null || value === undefined ? '' : print(value);
  };

  return (
    <figure className={styles.figure} aria-label={summary}>
      <div className={styles.axisName}>{flowLabel}</div>
      <div
        ref={frame}
        className={styles.stage}
        style={{ height, cursor: near ? 'pointer' : undefined }}
        onPointerMove={(event) => setNear(curveAt(event))}
        onPointerLeave={() => setNear(null)}
        onPointerUp={(event) => event.button === 0 && event.pointerType === 'mouse' && open(curveAt(event))}
      >
        <ThinCurves curves={plan.thinPixels} xs={plan.xs} near={near} width={width} height={height} />
        <ComposedChart
          width={width}
          height={height}
          data={plan.rows}
          margin={plan.margin}
          desc={summary}
          className={styles.chart}
        >
          <CartesianGrid stroke="var(--figure-grid)" />
          <XAxis
            type="number"
            dataKey="x"
            domain={xDomain}
            ticks={xTicks.map((tick) => tick.at)}
            tickFormatter={labelOf(xTicks, exceedanceText)}
            interval={0}
            height={plan.axisHeight}
            tick={{ fill: 'var(--figure-ink)', fontSize: 12 }}
            stroke="var(--figure-axis)"
            allowDataOverflow
          />
          <YAxis
            type="number"
            domain={flow.domain}
            ticks={flow.ticks.map((tick) => tick.at)}
            tickFormatter={labelOf(flow.ticks, tickText)}
            interval={0}
            width={plan.axisWidth}
            tick={{ fill: 'var(--figure-ink)', fontSize: 12 }}
            stroke="var(--figure-axis)"
            allowDataOverflow
          />
          {band && (
            <Area
              dataKey="band"
              stroke="none"
              fill="var(--figure-band)"
              fillOpacity={1}
              activeDot={false}
              isAnimationActive={false}
              tooltipType="none"
            />
          )}
          {band && (
            <Line
              dataKey="median"
              stroke="var(--figure-median)"
              strokeWidth={1.5}
              strokeDasharray="1 4"
              strokeLinecap="round"
              dot={false}
              activeDot={false}
              isAnimationActive={false}
            />
          )}
          {lines.map((line, index) => {
            const look = lineLook(index);
            return (
              <Line
                key={line.code}
                dataKey={`line${index}`}
                name={line.name}
                stroke={look.colour}
                strokeDasharray={look.dash}
                strokeWidth={near === line.code ? 3.5 : 2}
                strokeOpacity={near && near !== line.code ? 0.55 : 1}
                dot={false}
                activeDot={{ r: 3 }}
                isAnimationActive={false}
              />
            );
          })}
          <Tooltip
            isAnimationActive={false}
            cursor={{ stroke: 'var(--figure-axis)', strokeDasharray: '3 3' }}
            content={({ active, activeIndex }) =>
              active && activeIndex !== undefined && activeIndex !== null ? (
                <CurveReadout
                  exceedance={exceedances[Number(activeIndex)]}
                  index={Number(activeIndex)}
                  lines={lines}
                  band={band}
                  near={near}
                />
              ) : null
            }
          />
        </ComposedChart>
        {measured && <FlowLevels levels={levels} plan={plan} width={width} height={height} />}
        {measured && flow.breakAt !== null && (
          <span className={styles.axisBreak} style={{ left: plot.left, top: plan.toPixel(flow.breakAt) }} aria-hidden />
        )}
        {measured && flow.zeroAt !== null && (
          <span className={styles.zeroName} style={{ left: plot.left + 6, top: plan.toPixel(flow.zeroAt) }}>
            no flow
          </span>
        )}
        {measured && (
          <EndLabels lines={lines} ends={plan.ends} plot={plot} width={width} near={near} compact={plan.compact} />
        )}
      </div>
      <div
        className={styles.exceedanceName}
        style={{ paddingInlineStart: plot.left, paddingInlineEnd: width - plot.right }}
      >
        Share of time that the flow is reached or passed, %
      </div>
    </figure>
  );
}
