import { createHash } from 'node:crypto';
import {
  certaintyOfRows,
  type SimulatedStations,
  type SimulationTerms,
  simulateStations,
  simulationTerms,
} from '../../region/certainty.ts';
import type { Certainty } from '../../region/certainty-types.ts';
import type { SimulationBasis } from '../../region/simulate-station.ts';
import type { SimulatedRow } from '../../region/simulated-family.ts';

/** What a simulation of these stations has in common; its draws are named by the stations and what was tested at them. */
export function certaintyTerms({
  rows,
  basis,
  replicates,
}: {
  rows: SimulatedRow[];
  basis: SimulationBasis;
  replicates: number;
}): SimulationTerms {
  const hash = createHash('sha256');
  for (const { code, drying, years, values } of rows) {
    hash
      .update(JSON.stringify([code, drying]))
      .update(Float64Array.from(years))
      .update(Float64Array.from(values));
  }
  return simulationTerms(rows, basis, { replicates, seed: hash.digest('hex') });
}

/** Simulates some of the stations. */
export function simulate({ rows, terms }: { rows: SimulatedRow[]; terms: SimulationTerms }): SimulatedStations {
  return simulateStations(rows, terms);
}

/** Puts the parts together: spans, chances and detectable trends.
 *  @param task.parts  one after the other they are of the rows given, in their order */
export function certainty({
  rows,
  parts,
  terms,
}: {
  rows: SimulatedRow[];
  parts: SimulatedStations[];
  terms: SimulationTerms;
}): Certainty {
  const figures = new Float64Array(rows.length * terms.replicates);
  const detectable = new Float64Array(rows.length);
  let at = 0;
  for (const part of parts) {
    figures.set(part.figures, at * terms.replicates);
    detectable.set(part.detectable, at);
    at += part.detectable.length;
  }
  return certaintyOfRows(rows, { figures, detectable }, terms);
}
