import { area, count, type Units } from '@/app/components/format';
import type { YearCoverage } from '@/lib/jobs/types';
import type { StationFacts } from '@/lib/region/ranking-types';
import type { NamedFlow } from '@/lib/series/station-history';
import { InfluenceMark } from './influence-mark';
import { namedFlowText } from './named-levels';

interface Props {
  station: StationFacts;
  namedFlows: readonly NamedFlow[];
  coverage: readonly YearCoverage[];
  units: Units;
  labelOf(year: number): string;
}

export function StationFactList({ station, namedFlows, coverage, units, labelOf }: Props) {
  const { latitude, longitude } = station;
  const valued = coverage.filter((year) => year.state !== 'missing');
  const days = coverage.reduce((sum, year) => sum + year.days - year.missingDays, 0);
  return (
    <dl>
      <Fact name="Code">{station.code}</Fact>
      <Fact name="River">{station.river || 'not given'}</Fact>
      <Fact name="Drainage area">{station.areaKm2 === null ? 'not known' : area(station.areaKm2, units)}</Fact>
      <Fact name="Place">
        {latitude === null || longitude === null
          ? 'not known'
          : `${degrees(latitude, 'N', 'S')}, ${degrees(longitude, 'E', 'W')}`}
      </Fact>
      <Fact name="Influence">
        <InfluenceMark influence={station.influence} /> {station.influence}
      </Fact>
      <Fact name="Record">
        {valued.length === 0
          ? 'no values'
          : `${labelOf(valued[0].year)} to ${labelOf(valued[valued.length - 1].year)}, ${count(days, 'day')}`}
      </Fact>
      {namedFlows.map((flow) => (
        <Fact key={flow.name} name={flow.name}>
          {namedFlowText(flow)}
        </Fact>
      ))}
    </dl>
  );
}

function Fact({ name, children }: { name: string; children: React.ReactNode }) {
  return (
    <div>
      <dt>{name}</dt>
      <dd>{children}</dd>
    </div>
  );
}

/** Example: (-12.3456, 'N', 'S') → "12.346° S" */
function degrees(value: number, positive: string, negative: string): string {
  return `${Math.abs(value).toFixed(3)}° ${value < 0 ? negative : positive}`;
}
