import { ChangeLegend } from '@/app/components/change-marks/change-marks';
import { markedChanges } from '@/app/components/change-marks/marked-changes';
import { flowIn, signed, significant, UNIT_WORDS } from '@/app/components/format';
import { WarningNote } from '@/app/components/notes';
import ui from '@/app/components/ui.module.css';
import type { ResolvedBasis } from '@/lib/basis';
import { lowFlowYearLabel } from '@/lib/calendar/low-flow-year';
import { INDEX_FACTS } from '@/lib/region/index-facts';
import { indexOfYear } from '@/lib/region/index-of-year';
import type { PairComparison } from '@/lib/region/pair-types';
import type { StationChange } from '@/lib/series/station-history';
import { DoubleMassFigure } from './double-mass-figure';
import { toneOf, trendLine } from './pair-lines';
import styles from './pair-screen.module.css';
import { TrendTable } from './trend-table';
import { YearlyFigure } from './yearly-figure';
import { YearsTable } from './years-table';

interface Props {
  comparison: PairComparison;
  changes: readonly StationChange[];
  basis: ResolvedBasis;
  /** address of the CSV file */
  csv: string;
}

/** What the comparison came to, in words, as ratios on a time axis, as double-mass curve and in figures. */
export function ComparisonSection({ comparison, changes, basis, csv }: Props) {
  const { station, references, years, sentence, warnings, problem, ratioTrend, correlation } = comparison;
  const compared = years.filter(({ ratio }) => !Number.isNaN(ratio));
  const marked = markedChanges(changes);
  const { isFlow, unit, moreIsDrier } = INDEX_FACTS[basis.index];
  const shownUnit = isFlow ? UNIT_WORDS[basis.units].flow : unit;
  const shown = (value: number) => significant(isFlow ? flowIn(value, basis.units) : value);
  const labelOf = (year: number) => lowFlowYearLabel(year, basis.yearStart);
  const referenceName = references.length > 1 ? `the mean of ${references.length} references` : 'the reference';
  return (
    <section className={styles.section} aria-labelledby="comparison-title">
      <div className={styles.sectionHead}>
        <h2 id="comparison-title">Is it the weather they share?</h2>
        {problem === null && (
          <a className={ui.button} href={csv} download>
            Comparison CSV
          </a>
        )}
      </div>
      <p className={styles.sentence}>{sentence}</p>
      {warnings.map((warning) => (
        <WarningNote key={warning}>{warning}</WarningNote>
      ))}
      {problem === null && (
        <>
          <h3>Ratio, year by year</h3>
          <YearlyFigure
            points={compared.map(({ year, ratio }) => ({
              year,
              value: ratio,
              text: `${labelOf(year)}: ${significant(ratio)} times its ordinary share of ${referenceName}.`,
            }))}
            slope={trendLine(
              ratioTrend,
              compared.map(({ year }) => year),
            )}
            tone={toneOf(ratioTrend, basis.alpha, moreIsDrier)}
            level={{ value: 1, text: 'the ordinary ratio, 1' }}
            axisName={`${capital(indexOfYear(basis))} over that of ${referenceName}, each over its own mean`}
            changes={marked}
            yearStart={basis.yearStart}
            summary={`Ratio of ${station.name} to ${referenceName}, year by year, ${compared.length} years.`}
          />
          <ChangeLegend changes={marked} />
          <h3>Double-mass curve</h3>
          <DoubleMassFigure
            years={years}
            summary={`Double-mass curve of ${station.name} against ${referenceName}, ${years.length} years.`}
          />
          <p className={styles.caption}>
            Look for bends; no test is made at one, for a bend that the data suggest is found too easily.
          </p>
          <h3>Trends</h3>
          <TrendTable
            label="Trends of station, reference and ratio"
            rows={[
              { name: station.name, trend: comparison.stationTrend },
              {
                name: references.length > 1 ? 'Mean of the references' : references[0].name,
                trend: comparison.referenceTrend,
              },
              { name: 'Ratio of the two', trend: ratioTrend },
            ]}
          />
          <p className={styles.caption}>
            Over the {years.length} years that all have, by the basis’s test with the series’ own serial correction. p
            is of one test: nothing is adjusted. Rank correlation of station and reference {signed(correlation, 2)}.
          </p>
          <YearsTable
            summary="The years as a table"
            label="Station and reference, year by year"
            heads={[
              'Year',
              `${capital(indexOfYear(basis))}${shownUnit ? `, ${shownUnit}` : ''}`,
              'Reference',
              'Ratio',
              'Sum of station',
              'Sum of reference',
            ]}
            rows={years.map((each) => [
              labelOf(each.year),
              shown(each.station),
              significant(each.reference),
              significant(each.ratio),
              each.stationSum.toFixed(2),
              each.referenceSum.toFixed(2),
            ])}
          />
        </>
      )}
    </section>
  );
}

const capital = (words: string): string => words.charAt(0).toUpperCase() + words.slice(1);
