'use client';
import Link from 'next/link';
import { useState } from 'react';
import {
  fixed,
  flow,
  interval,
  pValue,
  range,
  signed,
  significant,
  UNIT_WORDS,
  type Units,
} from '@/app/components/format';
import { IntervalFigure, intervalScale } from '@/app/components/interval-figure';
import { ScrollFrame } from '@/app/components/scroll-frame';
import ui from '@/app/components/ui.module.css';
import type { RegionBreaks, Segment, StationBreaks, StepTest } from '@/lib/region/break-types';
import table from '../evidence-table.module.css';
import styles from './breaks.module.css';

interface Props {
  stations: RegionBreaks['stations'];
  alpha: number;
  units: Units;
  hrefOf(code: string): string;
}

/** As many rows as a page shows at first: thousands of stations are for the file. */
const FIRST_ROWS = 60;

interface Row extends Pick<StationBreaks, 'code' | 'name' | 'unit'> {
  step: StepTest;
}

/** Station by station: what was before, what came after, and the difference with its interval. */
export function BreakTable({ stations, alpha, units, hrefOf }: Props) {
  const [all, setAll] = useState(false);
  const rows = stations.flatMap(({ steps, code, name, unit }) =>
    steps.map((step): Row => ({ code, name, unit, step })),
  );
  const sorted = rows.sort((a, b) => (a.step.percent ?? Infinity) - (b.step.percent ?? Infinity));
  const scale = intervalScale(rows.flatMap(({ step }) => [step.percentLow, step.percentHigh]));
  const shown = all ? sorted : sorted.slice(0, FIRST_ROWS);
  if (rows.length === 0) return null;
  return (
    <>
      <ScrollFrame className={table.scroll} label="Before and after, station by station">
        <table className={table.table}>
          <caption>
            <span>
              Difference after less before (Hodges–Lehmann) in percent of the median before, with its 95 % interval; the
              largest fall first. p by the rank-sum test, corrected for carry-over; adjusted p over all rows of this
              table.
            </span>
          </caption>
          <thead>
            <tr>
              <th scope="col">Station</th>
              <th scope="col">Break</th>
              <th scope="col" className={table.number}>
                Median before
              </th>
              <th scope="col" className={table.number}>
                Median after
              </th>
              <th scope="col">Difference, %</th>
              <th scope="col" className={table.number}>
                p
              </th>
              <th scope="col" className={table.number}>
                Adjusted p
              </th>
              <th scope="col">To know</th>
            </tr>
          </thead>
          <tbody>
            {shown.map(({ code, name, unit, step }) => (
              <tr key={`${code} ${step.break.year}`}>
                <th scope="row">
                  <Link href={hrefOf(code)} prefetch={false}>
                    {name}
                  </Link>
                </th>
                <td className={table.words}>{step.break.words}</td>
                <Level segment={step.before} {...{ unit, units }} />
                <Level segment={step.after} {...{ unit, units }} />
                <td>
                  <span className={styles.figure}>
                    <span>
                      <strong>{signed(step.percent, 0)}</strong>{' '}
                      <span className={table.quiet}>
                        {step.percent !== null && interval(step.percentLow, step.percentHigh, 0)}
                      </span>
                    </span>
                    <IntervalFigure
                      scale={scale}
                      value={step.percent}
                      low={step.percentLow}
                      high={step.percentHigh}
                      significant={step.pAdjusted !== null && step.pAdjusted < alpha}
                      side={sideOf(step.percent)}
                      height={24}
                    />
                  </span>
                </td>
                <td className={table.number}>{pValue(step.p)}</td>
                <td className={table.number}>{pValue(step.pAdjusted)}</td>
                <td className={table.words}>{step.warning}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </ScrollFrame>
      {rows.length > shown.length && (
        <p>
          <button type="button" className={ui.button} onClick={() => setAll(true)}>
            Show all {fixed(rows.length)}
          </button>
        </p>
      )}
    </>
  );
}

interface LevelProps {
  segment: Segment;
  unit: string;
  units: Units;
}

function Level({ segment: { median, first, last, years }, unit, units }: LevelProps) {
  const isFlow = unit === UNIT_WORDS.metric.flow;
  return (
    <td className={table.number}>
      {isFlow ? flow(median, units) : `${significant(median)} ${unit}`}
      <br />
      <span className={table.quiet}>
        {range(first, last)}, {fixed(years)} years
      </span>
    </td>
  );
}

const sideOf = (percent: number | null): 'falling' | 'rising' | 'level' =>
  percent === null || percent === 0 ? 'level' : percent < 0 ? 'falling' : 'rising';
