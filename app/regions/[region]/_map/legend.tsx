'use client';
import { type ReactNode, useState } from 'react';
import { fixed, percent } from '@/app/components/format';
import { DAYS_AT_45_DEGREES, type Needle, needleOf, needleWords, PERCENT_AT_45_DEGREES } from '@/app/components/needle';
import { NeedleMark } from '@/app/components/needle-mark';
import type { AnnualIndexName } from '@/lib/basis';
import { INDEX_FACTS } from '@/lib/region/index-facts';
import type { MapRow } from '../map-row.ts';
import type { Fill } from '../map-state.ts';
import styles from './legend.module.css';

const TILT = 0.5;
interface Entry {
  words: string;
  needle: Needle;
  holds: (needle: Needle) => boolean;
}
const RANKED: Needle[] = [
  { kind: 'ranked', side: 'falling', significant: true, angle: TILT },
  { kind: 'ranked', side: 'falling', significant: false, angle: TILT },
  { kind: 'ranked', side: 'level', significant: true, angle: 0 },
  { kind: 'ranked', side: 'level', significant: false, angle: 0 },
  { kind: 'ranked', side: 'rising', significant: false, angle: -TILT },
  { kind: 'ranked', side: 'rising', significant: true, angle: -TILT },
];
const OTHERS: Entry[] = [
  {
    words: 'drying: days without flow',
    needle: { kind: 'drying', side: 'falling', significant: true, angle: TILT },
    holds: (needle) => needle.kind === 'drying',
  },
  {
    words: 'not ranked',
    needle: { kind: 'unranked', side: 'level', significant: false, angle: 0 },
    holds: (needle) => needle.kind === 'unranked',
  },
];
const SHARES = [0, 0.25, 0.5, 0.75, 1];

function entry(needle: Needle, index: AnnualIndexName): Entry {
  const holds = (other: Needle) =>
    other.kind === needle.kind && other.side === needle.side && other.significant === needle.significant;
  // a slope of 0 is level; with many equal years its trend may be significant for all that
  const words = needle.side === 'level' && !needle.significant ? 'level' : needleWords(needle, index);
  return { words, needle, holds };
}

interface LegendProps {
  rows: MapRow[];
  startOpen: boolean;
  /** what was chosen, and whether it can be shown yet */
  fill: Fill;
  isKnown: boolean;
  onFill: (fill: Fill) => void;
  /** of the steepest declines */
  k: number;
  /** what is compared */
  index: AnnualIndexName;
}

/** What the marks say, with how many there are of each; those that do not occur are left out. What fills the discs is
 *  chosen here. */
export function Legend({ rows, startOpen, fill, isKnown, onFill, k, index }: LegendProps) {
  const [open, setOpen] = useState(startOpen);
  const needles = rows.map(needleOf);
  const shared = fill !== 'significance' && isKnown;
  const entries = shared ? OTHERS.map(emptied) : [...RANKED.map((needle) => entry(needle, index)), ...OTHERS];
  return (
    <div className={styles.legend}>
      <button type="button" className={styles.toggle} aria-expanded={open} onClick={() => setOpen(!open)}>
        Marks
        <svg viewBox="0 0 12 12" width="12" height="12" aria-hidden="true">
          <path d={open ? 'M2 4l4 4 4-4' : 'M2 8l4-4 4 4'} fill="none" stroke="currentColor" strokeWidth="1.5" />
        </svg>
      </button>
      {open && (
        <ul>
          <li>
            <label className={styles.fill}>
              Filled by{' '}
              <select value={fill} onChange={(event) => onFill(event.currentTarget.value as Fill)}>
                <option value="significance">significance</option>
                <option value="steepest">
                  {k === 1 ? 'chance to be the steepest' : `chance to be among the ${k} steepest`}
                </option>
                <option value="span">how narrow the rank span is</option>
              </select>
            </label>
          </li>
          {fill !== 'significance' && !isKnown && <li className={styles.tilt}>not known yet: significance so far</li>}
          {shared && <Shares fill={fill} />}
          {entries.map(({ words, needle, holds }) => {
            const number = needles.filter(holds).length;
            return number === 0 ? null : (
              <li key={words}>
                <NeedleMark needle={needle} size={24} />
                {words}
                <b>{fixed(number)}</b>
              </li>
            );
          })}
          <li className={styles.tilt}>
            The steeper, the faster:{' '}
            {INDEX_FACTS[index].hasPercent ? `${PERCENT_AT_45_DEGREES}\u00a0%` : `${DAYS_AT_45_DEGREES} days`} a decade
            stands at 45°
          </li>
        </ul>
      )}
    </div>
  );
}

const emptied = (entry: Entry): Entry => ({ ...entry, needle: { ...entry.needle, significant: false } });

/** The scale of what fills the discs. */
function Shares({ fill }: { fill: Fill }): ReactNode {
  const words = (share: number) => {
    if (fill === 'steepest') return percent(share);
    return share === 0 ? 'any place' : share === 1 ? 'one place' : '';
  };
  return (
    <li className={styles.shares}>
      {SHARES.map((share) => (
        <span key={share}>
          <NeedleMark needle={{ kind: 'ranked', side: 'falling', significant: false, angle: TILT, share }} size={24} />
          {words(share)}
        </span>
      ))}
    </li>
  );
}
