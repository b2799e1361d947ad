import { regionStartEndMetadata, regionStartEndProduct } from '../../export/region-start-end-product.ts';
import { START_END_COLUMNS } from '../../export/start-end-csv.ts';
import { startEndsProduct } from '../../export/start-end-product.ts';
import { tableMetadata } from '../../export/table-metadata.ts';
import { rankingOf } from '../../jobs/ranking.ts';
import { regionStartEndOf } from '../../jobs/region-start-end.ts';
import { startEndOf } from '../../jobs/start-end.ts';
import {
  ANALYSIS_HELP,
  ANALYSIS_OPTIONS,
  type AnalysisRequest,
  analysisRequest,
  deliver,
  provenance,
  withWorkers,
} from '../analysis.ts';
import { plainFormat, readArguments } from '../arguments.ts';

export const usage = `Usage: npx hungerstone windows --region NAME [--station CODE]... [options]

The trend for every start year and end year with at least 15 usable years between: how many of the region's ranked
stations fall and rise in each window, or with --station the trend of these stations in each. Windows overlap, so that
they are no independent evidence.

${ANALYSIS_HELP}  --format geojson is refused: windows are no places
`;

export async function run(argv: string[]): Promise<number> {
  const { values } = readArguments(argv, ANALYSIS_OPTIONS);
  const format = plainFormat(values.format);
  return withWorkers(async () => {
    const request = await analysisRequest(values);
    await (values.station === undefined ? ofRegion(request, format) : ofStations(request, format, values.station));
    return 0;
  });
}

async function ofRegion(request: AnalysisRequest, format: 'csv' | 'json'): Promise<void> {
  const { region, basis } = request;
  const ranked = await rankingOf(region, basis);
  const chart = await regionStartEndOf(ranked);
  const from = await provenance(region, ranked.ranking.basis);
  await deliver(request, regionStartEndProduct(format, chart, from), (file) => regionStartEndMetadata(from, file));
}

async function ofStations(request: AnalysisRequest, format: 'csv' | 'json', codes: readonly string[]): Promise<void> {
  const { region, basis } = request;
  const stations = [];
  for (const code of new Set(codes)) stations.push(await startEndOf(region, basis, code));
  const from = await provenance(region, stations[0].basis);
  const title = `${region.name}: trend of stations for every start year and end year`;
  await deliver(request, startEndsProduct(format, stations, from), (file) =>
    tableMetadata(file, title, START_END_COLUMNS, from),
  );
  for (const { row, chart } of stations) {
    if (chart.windows === 0) process.stderr.write(`No window: ${row.code} ${row.name}: fewer than 15 usable years\n`);
  }
}
