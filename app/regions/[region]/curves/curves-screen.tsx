'use client';
import { useSearchParams } from 'next/navigation';
import { parseAsStringLiteral, useQueryStates } from 'nuqs';
import { useMemo } from 'react';
import { Cautions } from '@/app/components/cautions';
import { DurationFigure, type FigureBand, type FigureCurve } from '@/app/components/duration-figure/duration-figure';
import { MAX_LINES } from '@/app/components/duration-figure/line-looks';
import { count, type Units } from '@/app/components/format';
import { apiHref } from '@/app/components/links';
import { Empty } from '@/app/components/notes';
import { Segmented } from '@/app/components/segmented';
import ui from '@/app/components/ui.module.css';
import type { Basis } from '@/lib/basis';
import type { CurveKind, RegionCurves } from '@/lib/jobs/types';
import styles from './curves-screen.module.css';
import { CurvesTable } from './curves-table';
import { EXCEEDANCE_AXES, FLOW_AXES, flowName, type StationChoice, unitName } from './curves-view';
import { LeftOut, type LeftOutStation } from './left-out';
import { type PickableStation, StationPicker } from './station-picker';
import { useAsked } from './use-asked';

export interface ShownCurve extends FigureCurve {
  years: number;
  days: number;
}

interface Props {
  slug: string;
  kind: CurveKind;
  normalise: Basis['normalise'];
  /** what a link leaves unsaid */
  ownNormalise: Basis['normalise'];
  units: Units;
  unit: RegionCurves['unit'];
  exceedances: number[];
  stations: PickableStation[];
  choice: StationChoice;
  chosen: string[];
  hasMapView: boolean;
  shown: ShownCurve[];
  leftOut: LeftOutStation[];
  band: FigureBand;
}

const NORMALISE = [
  { value: 'area', label: 'per area', title: 'Flow per unit of drainage area' },
  { value: 'mean', label: '÷ mean', title: 'Flow as a ratio to the station’s own mean flow' },
  { value: 'median', label: '÷ median', title: 'Flow as a ratio to the station’s own median flow' },
  { value: 'none', label: 'as measured', title: 'Flow as measured, without making catchments comparable' },
] as const;

const KINDS = [
  { value: 'period', label: 'all days', title: 'All days of the usable years in one curve' },
  { value: 'median-annual', label: 'median year', title: 'The median over the years’ own curves' },
] as const;

export function CurvesScreen(props: Props) {
  const { slug, kind, normalise, units, unit, exceedances, shown, band, leftOut } = props;
  const query = useSearchParams();
  const [{ x, y }, setAxes] = useQueryStates({
    x: parseAsStringLiteral(EXCEEDANCE_AXES).withDefault('normal'),
    y: parseAsStringLiteral(FLOW_AXES).withDefault('log'),
  });
  const { asked, pending, ask } = useAsked(props);
  const setNormalise = (normalise: Basis['normalise']) => ask({ normalise });
  const lines = useMemo(() => shown.slice(0, MAX_LINES), [shown]);
  const thin = useMemo(() => shown.slice(MAX_LINES), [shown]);
  const csv = csvHref(apiHref(slug, 'curves', query.toString(), 'csv'), kind, shown);

  return (
    <div className={styles.screen} aria-busy={pending}>
      <StationPicker
        stations={props.stations}
        chosen={asked.chosen}
        lines={lines.map((line) => line.code)}
        choice={asked.choice}
        leftOut={leftOut}
        hasMapView={props.hasMapView}
        onChoose={(choice) => ask({ choice })}
      />
      <div className={styles.main}>
        <div className={styles.tools}>
          <Segmented label="Flow" value={asked.normalise} options={NORMALISE} onChange={setNormalise} />
          <Segmented label="Curve of" value={asked.kind} options={KINDS} onChange={(kind) => ask({ kind })} />
          <Segmented
            label="Share of time"
            value={x}
            options={[
              { value: 'normal', label: 'probability', title: 'Both ends drawn out, by the normal distribution' },
              { value: 'linear', label: 'even', title: 'Every percent equally wide' },
            ]}
            onChange={(value) => void setAxes({ x: value })}
          />
          <Segmented
            label="Flow axis"
            value={y}
            options={[
              { value: 'log', label: 'logarithmic' },
              { value: 'linear', label: 'linear' },
            ]}
            onChange={(value) => void setAxes({ y: value })}
          />
          <a className={ui.button} href={csv} download>
            Curves CSV
          </a>
        </div>
        <LeftOut slug={slug} stations={leftOut} normalise={normalise} onNormalise={setNormalise} />
        {shown.length === 0 ? (
          <Empty title="No curve to show">
            <p>
              None of the chosen stations has a curve on these terms. Choose others, or another way to compare flows.
            </p>
          </Empty>
        ) : (
          <>
            <DurationFigure
              exceedances={exceedances}
              lines={lines}
              thin={thin}
              band={band}
              flowLabel={flowName(unit, normalise, units)}
              x={x}
              y={y}
              summary={`Duration curves of ${count(shown.length, 'station')}: ${flowName(unit, normalise, units)}. The table below gives the figures.`}
            />
            <p className={styles.key}>
              <span className={styles.bandKey} aria-hidden="true" /> 10–90 % of the region’s stations, dotted their
              median
              {thin.length > 0 && <> · {count(thin.length, 'more station')} drawn thin</>} · a click on a curve opens
              its station
            </p>
            <CurvesTable
              exceedances={exceedances}
              curves={shown}
              lines={lines.length}
              band={band}
              unit={unitName(unit, normalise, units)}
              kind={kind}
            />
            <Cautions />
          </>
        )}
      </div>
    </div>
  );
}

/** The file of the curves shown; of all stations' where naming them would make the address too long. */
function csvHref(base: string, kind: CurveKind, shown: readonly ShownCurve[]): string {
  const more = new URLSearchParams(kind === 'period' ? {} : { kind });
  const codes = shown.map((curve) => curve.code);
  const nameable = codes.every((code) => !code.includes(','));
  if (nameable && codes.length <= MOST_NAMED) more.set('stations', codes.join(','));
  const text = more.toString();
  return text ? `${base}&${text}` : base;
}

const MOST_NAMED = 200;
