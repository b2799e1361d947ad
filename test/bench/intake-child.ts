/** Reads one flow file in a process of its own, so that its peak memory is that of the reading alone.
 *  Arguments: file, unit. Prints JSON: rows, stations, seconds, peakMB. */
import { performance } from 'node:perf_hooks';
import { readFlows } from '../../lib/intake/read-flows.ts';
import type { FlowUnit } from '../../lib/intake/types.ts';

const [path, unit] = process.argv.slice(2);
const start = performance.now();
let values = 0;
const report = await readFlows(path, {
  fileName: 'bench.csv',
  unit: unit as FlowUnit,
  emit: (part) => {
    values += part.values.length;
  },
});
const seconds = (performance.now() - start) / 1000;
const peakMB = Math.round(process.resourceUsage().maxRSS / 1024);
process.stdout.write(JSON.stringify({ rows: report.rows, values, stations: report.stations.length, seconds, peakMB }));
