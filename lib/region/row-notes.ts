import type { ResolvedBasis } from '../basis.ts';
import { lowSeasonCut } from './low-season-cut.ts';
import type { RankingRow } from './ranking-types.ts';
import { recordingStep } from './recording-step.ts';
import type { UsedYears } from './used-years.ts';

/** From this share of zero minima on a ranked station is marked: slopes of 0 are then common without any trend. */
const MARKED_ZERO_SHARE = 0.1;
/** Below so many recording steps the minima come in few values, and a percentage says more than was measured. */
const COARSE_BELOW_STEPS = 10;

/** What a reader must know of one station's figures, as one line; empty when there is nothing. */
export function noteOf(row: RankingRow, used: UsedYears, basis: ResolvedBasis): string {
  const notes = [
    derivedNote(row),
    periodNote(row, basis),
    figureNote(row, basis),
    zeroNote(row),
    coarseNote(row, basis),
  ];
  notes.push(lowSeasonCut(used, basis));
  return notes.filter((note) => note !== null).join('; ');
}

const derivedNote = ({ derivedFrom }: RankingRow): string | null =>
  derivedFrom === undefined ? null : `derived record, ${derivedFrom}`;

function periodNote({ firstYear, lastYear }: RankingRow, { period }: ResolvedBasis): string | null {
  if (period !== null) return null;
  return firstYear === null
    ? 'periods differ between stations'
    : `own years ${firstYear}–${lastYear}: periods differ between stations`;
}

function figureNote(row: RankingRow, { rankBy }: ResolvedBasis): string | null {
  if (row.rank === null || rankingFigure(row, rankBy) !== null) return null;
  if (rankBy === 'specific-change') return 'no drainage area, so no change in L/s/km²: placed after all that have it';
  if (rankBy === 'kendall-tau') return 'all minima are equal, so no tau: placed after all that have it';
  return 'mean minimum is not above 0, so no percentage of it: placed after all that have it';
}

/** The figure that a row is ranked by; null when it has none. */
export function rankingFigure(
  row: Pick<RankingRow, 'percentPerDecade' | 'specificPerDecade' | 'tau'>,
  rankBy: ResolvedBasis['rankBy'],
): number | null {
  switch (rankBy) {
    case 'percent-per-decade':
      return row.percentPerDecade;
    case 'specific-change':
      return row.specificPerDecade;
    case 'kendall-tau':
      return row.tau;
  }
}

function zeroNote({ rank, zeroFlowYears, yearsUsed }: RankingRow): string | null {
  if (rank === null || zeroFlowYears < MARKED_ZERO_SHARE * yearsUsed || zeroFlowYears === 0) return null;
  return `${zeroFlowYears} of ${yearsUsed} minima are zero, so its slope is drawn towards 0`;
}

function coarseNote({ rank, meanMinimum, minima }: RankingRow, { days }: ResolvedBasis): string | null {
  if (rank === null || meanMinimum === null || meanMinimum <= 0) return null;
  const step = recordingStep(minima, days);
  if (!(meanMinimum < COARSE_BELOW_STEPS * step)) return null;
  return `mean minimum is ${Number((meanMinimum / step).toPrecision(2))} recording steps (of ${Number(
    step.toPrecision(3),
  )} m³/s, estimated from the minima), so its percentage is coarse`;
}
