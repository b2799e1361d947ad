import Link from 'next/link';
import { DurationFigure } from '@/app/components/duration-figure/duration-figure';
import { count } from '@/app/components/format';
import { regionHref, stationHref } from '@/app/components/links';
import ui from '@/app/components/ui.module.css';
import type { StationDetail } from '@/lib/jobs/types';
import { flowName, shownFlows } from '../../curves/curves-view';
import type { NamedLevel } from './named-levels';
import styles from './station-screen.module.css';

interface Props {
  slug: string;
  detail: StationDetail;
  levels: readonly NamedLevel[];
  query: URLSearchParams;
}

/** The station's duration curve over the band of its region, or why there is none and what would give one. */
export function StationCurve({ slug, detail, levels, query }: Props) {
  const { curve, station, basis, region } = detail;
  const flowsOf = (flows: ArrayLike<number>) => shownFlows(flows, region.unit, basis.units);
  if (!curve) {
    const other = new URLSearchParams(query);
    const ways = (['mean', 'median'] as const).filter((way) => way !== basis.normalise);
    return (
      <div className={styles.nothing}>
        <p>No curve on these terms: {detail.noCurveReason ?? 'the record has no usable year in the period'}.</p>
        {basis.normalise !== 'none' && detail.row.yearsUsed > 0 && (
          <p className={styles.ways}>
            {ways.map((way) => {
              other.set('normalise', way);
              return (
                <Link key={way} className={ui.button} href={stationHref(slug, station.code, other)} prefetch={false}>
                  Compare as a ratio to the {way} flow
                </Link>
              );
            })}
          </p>
        )}
      </div>
    );
  }
  const { p10, p50, p90 } = region.band;
  const shownLevels = levels.flatMap(({ label, flow }) => {
    const [shown] = flowsOf([flow / unitOfCurve(detail)]);
    return shown === null ? [] : [{ label, flow: shown }];
  });
  const line = {
    code: station.code,
    name: station.name,
    href: stationHref(slug, station.code, query),
    flows: flowsOf(curve.flows),
  };
  return (
    <>
      <DurationFigure
        exceedances={Array.from(region.exceedances)}
        lines={[line]}
        band={{ p10: flowsOf(p10), p50: flowsOf(p50), p90: flowsOf(p90) }}
        levels={shownLevels}
        flowLabel={flowName(region.unit, basis.normalise, basis.units)}
        x="normal"
        y="log"
        height={400}
        summary={`Duration curve of ${station.name} over the band of the region’s stations.`}
      />
      <p className={styles.caption}>
        {count(curve.days, 'day')} of {count(curve.years, 'usable year')}. Shaded: 10–90 % of the region’s stations;
        dotted: their median.{' '}
        <Link
          href={`${regionHref(slug, 'curves', query)}${query.size ? '&' : '?'}stations=${encodeURIComponent(station.code)}`}
          prefetch={false}
        >
          Compare with chosen stations
        </Link>
      </p>
    </>
  );
}

/** m³/s in one unit of the curve: a flow over it stands beside the curve's flows. */
function unitOfCurve({ curve, basis, station, region }: StationDetail): number {
  if (region.unit === 'm³/s') return 1;
  if (region.unit === 'L/s/km²') return (station.areaKm2 ?? Number.NaN) / 1000;
  return (basis.normalise === 'mean' ? curve?.mean : curve?.median) ?? Number.NaN;
}
