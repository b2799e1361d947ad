import Link from 'next/link';
import { Cautions } from '@/app/components/cautions';
import { ChangeLegend } from '@/app/components/change-marks/change-marks';
import { markedChanges } from '@/app/components/change-marks/marked-changes';
import { count, shareText } from '@/app/components/format';
import { apiHref, deriveHref, pairHref, regionHref, stationEditHref, stationHref } from '@/app/components/links';
import { needleOf, needleWords } from '@/app/components/needle';
import { NeedleMark } from '@/app/components/needle-mark';
import ui from '@/app/components/ui.module.css';
import { lowFlowYearLabel } from '@/lib/calendar/low-flow-year';
import type { StationDetail } from '@/lib/jobs/types';
import { INDEX_FACTS } from '@/lib/region/index-facts';
import { INDEX_WORDS } from '@/lib/region/index-words';
import type { RankingRow } from '@/lib/region/ranking-types';
import type { RegionRow } from '@/lib/store/regions';
import { CertaintyProvider } from '../../_certainty/certainty-context';
import { breaksData } from './_breaks/breaks-data';
import { BreaksSection } from './_breaks/breaks-section';
import { DetectableNote } from './_sureness/detectable-note';
import { PlaceNote } from './_sureness/place-note';
import { SurenessFigures } from './_sureness/sureness-figures';
import { StartEndSection } from './_windows/start-end-section';
import { AlongRiver } from './along-river';
import { BesideFigures } from './beside-figures';
import { CoverageStrip } from './coverage-strip';
import { DerivedNote } from './derived-note';
import { indexScale } from './index-scale';
import { MinimaFigure } from './minima-figure';
import { comparedPoints, minimaPoints } from './minima-points';
import { MinimaTable } from './minima-table';
import { namedLevels } from './named-levels';
import { Neighbours } from './neighbours';
import { PrintButton } from './print-button';
import { placeOf } from './ranking-place';
import { RankingSteps } from './ranking-steps';
import type { StationBackground } from './station-background';
import { StationCurve } from './station-curve';
import { StationFactList } from './station-fact-list';
import styles from './station-screen.module.css';
import { TrendFigures } from './trend-figures';

interface Props {
  region: Pick<RegionRow, 'slug' | 'name'>;
  detail: StationDetail;
  background: StationBackground;
  rows: readonly RankingRow[];
  query: URLSearchParams;
  /** the basis in force, as URL text: what differs from the region's own */
  basisQuery: string;
}

export function StationScreen({ region, detail, background, rows, query, basisQuery }: Props) {
  const { station, row, basis, coverage } = detail;
  const needle = needleOf(row);
  const points = comparedPoints(minimaPoints(detail.minima, basis.yearStart, row.years), row, basis.index);
  // under Drying the figure shows the minima, whatever is compared
  const scale = indexScale(row.drying ? 'minimum' : basis.index, basis.days, basis.units);
  const span = yearSpan(coverage.map((year) => year.year).concat(points.map((point) => point.year)));
  const place = placeOf(rows, station.code);
  const labelOf = (year: number) => lowFlowYearLabel(year, basis.yearStart);
  const changes = markedChanges(background.station.changes);
  const levels = INDEX_FACTS[scale.index].isFlow ? namedLevels(background.station.namedFlows, station.areaKm2) : [];
  const mapQuery = new URLSearchParams(query);
  mapQuery.set('station', station.code);
  const table = (name: string) =>
    apiHref(region.slug, `stations/${encodeURIComponent(station.code)}/${name}`, query, 'csv');

  const terms = { index: basis.index, drying: row.drying, units: basis.units };
  const { falling, rising } = INDEX_WORDS[scale.index];
  const tested = rows.filter((other) => other.rank !== null || other.drying).length;

  return (
    <CertaintyProvider slug={region.slug} terms={basisQuery} tested={tested}>
      <article className={styles.page}>
        <header className={styles.head}>
          <nav className={styles.steps} aria-label="Ways from here">
            <Link href={regionHref(region.slug, 'map', mapQuery)} prefetch={false}>
              ← Map and ranking
            </Link>
            <span className={styles.ranks}>
              <RankingSteps
                previous={
                  place.previous && { ...place.previous, href: stationHref(region.slug, place.previous.code, query) }
                }
                next={place.next && { ...place.next, href: stationHref(region.slug, place.next.code, query) }}
              />
              <Link href={stationEditHref(region.slug, station.code, query)} prefetch={false}>
                Edit
              </Link>
              <Link href={pairHref(region.slug, station.code, query)} prefetch={false}>
                Against a reference
              </Link>
              <Link href={deriveHref(region.slug, station.code, query)} prefetch={false}>
                Derive from it
              </Link>
              <PrintButton />
            </span>
          </nav>
          <div className={styles.title}>
            <NeedleMark needle={needle} size={56} />
            <div>
              <h1>{station.name}</h1>
              <p className={styles.place}>
                {row.rank === null ? needleWords(needle, basis.index) : `ranked ${row.rank} of ${detail.ranked}`}
                <PlaceNote code={station.code} />
                {row.rank !== null && ` · ${needleWords(needle, basis.index)}`}
              </p>
            </div>
          </div>
          <p className={styles.verdict}>{detail.verdict}</p>
          {row.trend === 'none' && <DetectableNote code={station.code} terms={terms} />}
          {row.note && <p className={styles.note}>{row.note}</p>}
          <DerivedNote slug={region.slug} background={background} query={query} />
        </header>

        <div className={styles.facts}>
          <StationFactList
            station={station}
            namedFlows={background.station.namedFlows}
            coverage={coverage}
            units={basis.units}
            labelOf={labelOf}
          />
          {background.station.notes && <p className={styles.notes}>{background.station.notes}</p>}
        </div>

        <section className={styles.figures} aria-labelledby="minima-title">
          <div className={styles.sectionHead}>
            <h2 id="minima-title">{INDEX_WORDS[scale.index].heading}</h2>
            <a className={ui.button} href={table('minima')} download>
              Minima CSV
            </a>
          </div>
          {points.length === 0 ? (
            <p className={styles.nothing}>The record has no low-flow year with values.</p>
          ) : (
            <>
              <MinimaFigure
                points={points}
                slope={detail.line}
                trend={row.trend}
                scale={scale}
                days={basis.days}
                changes={changes}
                levels={levels}
                yearStart={basis.yearStart}
                span={span}
                summary={`${scale.axisName}, at ${station.name}: ${count(points.length, 'year')}.`}
              />
              <h3 className={styles.coverageTitle}>Days with a value</h3>
              <CoverageStrip
                slug={region.slug}
                code={station.code}
                years={coverage.map((year) => ({ ...year, label: labelOf(year.year) }))}
                changes={changes}
                yearStart={basis.yearStart}
                span={span}
                summary={`Days with a value in each year of the record of ${station.name}.`}
              />
              <ChangeLegend changes={changes} />
              {levels.length > 0 && (
                <p className={styles.caption}>
                  Named flows are screening values: permits and water rights need the authority’s own method, and local
                  codes come first.
                </p>
              )}
              <MinimaTable points={points} units={basis.units} days={basis.days} scale={scale} />
            </>
          )}
        </section>

        <aside className={styles.side}>
          <TrendFigures row={row} units={basis.units} scale={scale} labelOf={labelOf} />
          {row.trend !== null && (
            <SurenessFigures code={station.code} rank={row.rank} steadiness={shareText(row.steadiness)} terms={terms} />
          )}
          <AlongRiver slug={region.slug} background={background} query={query} />
          <Neighbours
            slug={region.slug}
            station={station}
            near={detail.neighbours}
            rows={rows}
            index={basis.index}
            query={query}
          />
        </aside>

        <section className={styles.curve} aria-labelledby="curve-title">
          <div className={styles.sectionHead}>
            <h2 id="curve-title">Duration curve against the region</h2>
            {detail.curve && (
              <a className={ui.button} href={table('curve')} download>
                Curve CSV
              </a>
            )}
          </div>
          <StationCurve slug={region.slug} detail={detail} levels={levels} query={query} />
        </section>

        <StartEndSection
          slug={region.slug}
          terms={basisQuery}
          code={station.code}
          name={station.name}
          alpha={basis.alpha}
          ways={{ falling, rising }}
        />

        {row.trend !== null && (
          <BreaksSection
            slug={region.slug}
            terms={basisQuery}
            code={station.code}
            data={breaksData(row, basis, span)}
            yearStart={basis.yearStart}
            alpha={basis.alpha}
          />
        )}

        <BesideFigures
          slug={region.slug}
          code={station.code}
          beside={background.beside}
          changes={changes}
          units={basis.units}
        />

        <footer className={styles.foot}>
          <Cautions />
        </footer>
      </article>
    </CertaintyProvider>
  );
}

/** First and last year of the page's time axis: whole span of the record, at least a few years wide. */
function yearSpan(years: readonly number[]): [number, number] {
  if (years.length === 0) return [2000, 2004];
  const first = Math.min(...years);
  const last = Math.max(...years);
  const pad = Math.max(0, Math.ceil((4 - (last - first)) / 2));
  return [first - pad, last + pad];
}
