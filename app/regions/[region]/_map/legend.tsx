'use client';
import { useState } from 'react';
import { fixed } from '@/app/components/format';
import type { Needle } from '@/app/components/needle';
import { needleOf, PERCENT_AT_45_DEGREES } from '@/app/components/needle';
import { NeedleMark } from '@/app/components/needle-mark';
import type { MapRow } from '../map-row.ts';
import styles from './legend.module.css';

const TILT = 0.5;
const ENTRIES: { words: string; needle: Needle; holds: (needle: Needle) => boolean }[] = [
  entry('falling, significant', { kind: 'ranked', side: 'falling', significant: true, angle: TILT }),
  entry('falling, may be chance', { kind: 'ranked', side: 'falling', significant: false, angle: TILT }),
  entry('level', { kind: 'ranked', side: 'level', significant: false, angle: 0 }),
  entry('rising, may be chance', { kind: 'ranked', side: 'rising', significant: false, angle: -TILT }),
  entry('rising, significant', { kind: 'ranked', side: 'rising', significant: true, angle: -TILT }),
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

function entry(words: string, needle: Needle) {
  const holds = (other: Needle) =>
    other.kind === needle.kind && other.side === needle.side && other.significant === needle.significant;
  return { words, needle, holds };
}

/** What the marks say, with how many there are of each; those that do not occur are left out. */
export function Legend({ rows, startOpen }: { rows: MapRow[]; startOpen: boolean }) {
  const [open, setOpen] = useState(startOpen);
  const needles = rows.map(needleOf);
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
          {ENTRIES.map(({ words, needle, holds }) => {
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
            The steeper, the faster: {PERCENT_AT_45_DEGREES}&nbsp;% a decade stands at 45°
          </li>
        </ul>
      )}
    </div>
  );
}
