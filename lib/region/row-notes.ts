import type { ResolvedBasis } from '../basis.ts';
import { datesOnALine } from '../lowflow/minimum-dates.ts';
import { INDEX_WORDS } from './index-words.ts';
import { lowSeasonCut } from './low-season-cut.ts';
import { rankingFigure } from './ranking-figure.ts';
import type { RankingRow } from './ranking-types.ts';
import { recordingStep } from './recording-step.ts';
import type { UsedYears } from './used-years.ts';

/** From this share of zeros on a ranked station is marked: slopes of 0 are then common without any trend. */
const MARKED_ZERO_SHARE = 0.1;
/** Below so many recording steps the minima come in few values, and a percentage says more than was measured. */
const COARSE_BELOW_STEPS = 10;
/** Dates less concentrated than this come from more than one season. */
const FEWEST_CONCENTRATION = 0.5;

/** What a reader must know of one station's figures, as one line; empty when there is nothing. */
export function noteOf(row: RankingRow, used: UsedYears, basis: ResolvedBasis): string {
  const notes = [
    derivedNote(row),
    periodNote(row, basis),
    figureNote(row, basis),
    zeroNote(row, used, basis),
    coarseNote(row, basis),
    datesNote(row, used, basis),
    // neither a year's mean flow nor its baseflow index knows of a low season
    basis.index === 'mean-flow' || basis.index === 'bfi' ? null : lowSeasonCut(used, basis),
  ];
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

function figureNote(row: RankingRow, { rankBy, index }: ResolvedBasis): string | null {
  if (row.rank === null || rankingFigure(row, rankBy) !== null) return null;
  if (rankBy === 'specific-change') {
    const unit = index === 'deficit' ? 'mm' : 'L/s/km²';
    return `no drainage area, so no change in ${unit}: placed after all that have it`;
  }
  const { many, mean } = INDEX_WORDS[index];
  if (rankBy === 'kendall-tau') return `all ${many} are equal, so no tau: placed after all that have it`;
  return `${mean} is not above 0, so no percentage of it: placed after all that have it`;
}

function zeroNote({ rank, yearsUsed }: RankingRow, { zeroValues }: UsedYears, { index }: ResolvedBasis): string | null {
  if (rank === null || zeroValues < MARKED_ZERO_SHARE * yearsUsed || zeroValues === 0) return null;
  const slope =
    3 * zeroValues >= yearsUsed
      ? 'so its slope is mostly 0 and says little: Kendall’s tau and its p say more'
      : 'so its slope is drawn towards 0';
  return `${zeroValues} of ${yearsUsed} ${INDEX_WORDS[index].many} are zero, ${slope}`;
}

function datesNote({ rank }: RankingRow, { days }: UsedYears, { index }: ResolvedBasis): string | null {
  if (rank === null || index !== 'minimum-date') return null;
  const { concentration } = datesOnALine(days);
  if (concentration >= FEWEST_CONCENTRATION) return null;
  return `its minima come in more than one season (concentration of dates ${concentration.toFixed(2)}), so a trend in their dates says little: one season at a time says more`;
}

function coarseNote({ rank, meanMinimum, minima }: RankingRow, { days, index }: ResolvedBasis): string | null {
  if (index !== 'minimum' || rank === null || meanMinimum === null || meanMinimum <= 0) return null;
  const step = recordingStep(minima, days);
  if (!(meanMinimum < COARSE_BELOW_STEPS * step)) return null;
  return `mean minimum is ${Number((meanMinimum / step).toPrecision(2))} recording steps (of ${Number(
    step.toPrecision(3),
  )} m³/s, estimated from the minima), so its percentage is coarse`;
}
