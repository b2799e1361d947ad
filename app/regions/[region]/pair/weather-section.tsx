import Link from 'next/link';
import { flowIn, MISSING, signed, significant, UNIT_WORDS } from '@/app/components/format';
import { WarningNote } from '@/app/components/notes';
import ui from '@/app/components/ui.module.css';
import type { ResolvedBasis } from '@/lib/basis';
import { lowFlowYearLabel } from '@/lib/calendar/low-flow-year';
import type { WeatherAnswer } from '@/lib/jobs/weather';
import type { WeatherTrend } from '@/lib/region/pair-types';
import { quantityWords } from '@/lib/series/quantities';
import { toneOf, trendLine } from './pair-lines';
import styles from './pair-screen.module.css';
import { TrendTable } from './trend-table';
import { WeatherFigure } from './weather-figure';
import { YearlyFigure } from './yearly-figure';
import { YearsTable } from './years-table';

interface Props {
  weather: WeatherAnswer;
  basis: ResolvedBasis;
  csv: string;
  /** the page's address with other weather */
  hrefWith(changes: Record<string, string>): string;
}

/** The minima given the rain or the evaporation before them. */
export function WeatherSection({ weather: { trend, sources }, basis, csv, hrefWith }: Props) {
  return (
    <section className={styles.section} aria-labelledby="weather-title">
      <div className={styles.sectionHead}>
        <h2 id="weather-title">Given the weather before each minimum</h2>
        {trend && trend.problem === null && (
          <a className={ui.button} href={csv} download>
            Weather CSV
          </a>
        )}
      </div>
      {trend === null ? (
        <p className={styles.caption}>
          No rainfall and no evaporation is stored in this region. Imported beside a station’s flow, it shows here what
          the weather leaves of a trend.
        </p>
      ) : (
        <>
          <Choices trend={trend} sources={sources} hrefWith={hrefWith} />
          <p className={styles.sentence}>{trend.sentence}</p>
          {trend.warnings.map((warning) => (
            <WarningNote key={warning}>{warning}</WarningNote>
          ))}
          {trend.problem === null && <Figures trend={trend} basis={basis} />}
        </>
      )}
    </section>
  );
}

/** Which weather, and how many days of it, each a link. */
function Choices({
  trend,
  sources,
  hrefWith,
}: Pick<Props, 'hrefWith'> & { trend: WeatherTrend; sources: WeatherAnswer['sources'] }) {
  return (
    <div className={styles.choices}>
      <nav aria-label="Weather records">
        <span className={ui.hint}>Weather</span>
        <ul>
          {sources.slice(0, 8).map(({ quantity, code, name, km }) => (
            <li key={`${code} ${quantity}`}>
              <Link
                href={hrefWith({ quantity, from: code })}
                prefetch={false}
                scroll={false}
                aria-current={quantity === trend.quantity && code === trend.from.code ? 'true' : undefined}
              >
                {quantityWords(quantity)} {code === trend.station.code ? 'at the station' : `at ${name || code}`}
                {code !== trend.station.code && km !== null && `, ${Math.round(km)} km`}
              </Link>
            </li>
          ))}
        </ul>
      </nav>
      <nav aria-label="Days before the minimum">
        <span className={ui.hint}>Days before, with their rank correlation with the minima</span>
        <ul>
          {trend.choices.map(({ antecedentDays, correlation }) => (
            <li key={antecedentDays}>
              <Link
                href={hrefWith({ antecedentDays: String(antecedentDays) })}
                prefetch={false}
                scroll={false}
                aria-current={antecedentDays === trend.antecedentDays ? 'true' : undefined}
              >
                {antecedentDays} days ({correlation === null ? MISSING : signed(correlation, 2)})
              </Link>
            </li>
          ))}
        </ul>
      </nav>
    </div>
  );
}

function Figures({ trend, basis }: { trend: WeatherTrend; basis: ResolvedBasis }) {
  const { station, years, adjusted, quantity, antecedentDays, from } = trend;
  const factor = flowIn(1, basis.units) ?? 1;
  const unit = UNIT_WORDS[basis.units].flow;
  const labelOf = (year: number) => lowFlowYearLabel(year, basis.yearStart);
  const where = from.code === station.code ? '' : ` at ${from.name || from.code}`;
  const weatherName = `${quantityWords(quantity)} of the ${antecedentDays} days before${where}, mm`;
  const minimumName = `${basis.days}-day minimum`;
  return (
    <>
      <h3>Minimum after such weather</h3>
      <WeatherFigure
        years={years}
        factor={factor}
        unit={unit}
        weatherName={weatherName}
        minimumName={minimumName}
        summary={`Minima of ${station.name} over the weather before them, ${years.length} years.`}
      />
      <h3>What the weather leaves, year by year</h3>
      <YearlyFigure
        points={years.map(({ year, residual }) => ({
          year,
          value: residual * factor,
          text: `${labelOf(year)}: ${significant(Math.abs(residual * factor))} ${unit} ${residual < 0 ? 'less' : 'more'} than such weather usually leaves.`,
        }))}
        slope={trendLine(
          adjusted,
          years.map(({ year }) => year),
          factor,
        )}
        tone={toneOf(adjusted, basis.alpha)}
        level={{ value: 0, text: 'as such weather usually leaves it' }}
        axisName={`${minimumName} less what such weather usually leaves, ${unit}`}
        changes={[]}
        yearStart={basis.yearStart}
        summary={`What the weather leaves of the minima of ${station.name}, year by year, ${years.length} years.`}
      />
      <h3>Trends</h3>
      <TrendTable
        label="Trends of minima and weather"
        rows={[
          { name: 'Minima as they are', trend: trend.plain },
          { name: 'Minima given the weather', trend: adjusted },
          { name: `The ${quantityWords(quantity)} before them`, trend: trend.weather },
        ]}
      />
      <p className={styles.caption}>
        A smooth curve (LOWESS, span two thirds) says what such weather usually leaves; the test is of what lies above
        and below it. Choose the days before looking at the trend: the correlations know nothing of it.
      </p>
      <YearsTable
        summary="The years as a table"
        label="Minima and the weather before them, year by year"
        heads={['Year', `${minimumName}, ${unit}`, 'Weather, mm', `Usual after it, ${unit}`, `Left, ${unit}`]}
        rows={years.map(({ year, minimum, weather, fitted, residual }) => [
          labelOf(year),
          significant(minimum * factor),
          String(Math.round(weather)),
          significant(fitted * factor),
          significant(residual * factor),
        ])}
      />
    </>
  );
}
