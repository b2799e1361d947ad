import { parseBasis } from '../../basis.ts';
import { CURVE_COLUMNS } from '../../export/curves-csv.ts';
import { curvesProduct } from '../../export/curves-product.ts';
import { narrowTo } from '../../export/narrow.ts';
import { tableMetadata } from '../../export/table-metadata.ts';
import { curvesOf } from '../../jobs/curves.ts';
import { CURVE_KINDS } from '../../jobs/types.ts';
import {
  ANALYSIS_HELP,
  ANALYSIS_OPTIONS,
  analysisRequest,
  deliver,
  provenance,
  sayLeftOut,
  withWorkers,
} from '../analysis.ts';
import { readArguments } from '../arguments.ts';
import { UsageError } from '../usage-error.ts';

export const usage = `Usage: npx hungerstone curves --region NAME [options]

Flow-duration curves over the usable years of the period. Stations without a curve on the scale asked for are named on
stderr, with the reason.

${ANALYSIS_HELP}  --normalise BY   area (L/s/km²), mean, median (ratios) or none (m³/s)
  --kind KIND      period (default): all days pooled; median-annual: the median of the years' own curves
`;

const OPTIONS = {
  ...ANALYSIS_OPTIONS,
  normalise: { type: 'string' },
  kind: { type: 'string', default: 'period' },
} as const;

const SCALES = ['area', 'mean', 'median', 'none'] as const;

export async function run(argv: string[]): Promise<number> {
  const { values } = readArguments(argv, OPTIONS);
  const kind = CURVE_KINDS.find((known) => known === values.kind);
  if (!kind) throw new UsageError(`--kind takes ${CURVE_KINDS.join(' or ')}, not "${values.kind}".`);
  const { normalise } = values;
  const scale = SCALES.find((known) => known === normalise);
  if (normalise !== undefined && !scale) {
    throw new UsageError(`--normalise takes ${SCALES.join(', ')}, not "${normalise}".`);
  }
  return withWorkers(async () => {
    const request = await analysisRequest(values);
    const { region, format, narrowing } = request;
    const basis = scale ? parseBasis({ normalise: scale }, request.basis) : request.basis;
    const curves = await curvesOf(region, basis, kind);
    const leftOut = narrowTo(curves.leftOut, narrowing, ({ station }) => station);
    const named = leftOut.map(({ station: { code, name }, reason }) => ({ code, name, reason }));
    const from = await provenance(
      region,
      curves.basis,
      named.map(({ code, reason }) => `${code} is left out: ${reason}`),
    );
    await deliver(request, curvesProduct(format, curves, from, narrowing), (file) =>
      tableMetadata(file, `${region.name}: flow-duration curves`, CURVE_COLUMNS, from),
    );
    sayLeftOut('No curve', named);
    return 0;
  });
}
