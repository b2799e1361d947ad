'use client';
import { Popover } from '@base-ui/react/popover';
import { type ReactNode, useState } from 'react';
import { fixed, percent } from '@/app/components/format';
import ui from '@/app/components/ui.module.css';
import { MOST_STEEPEST } from '@/lib/region/certainty-types';
import type { CertaintyAnswer } from '../_certainty/use-certainty.ts';
import styles from './sureness.module.css';

interface SurenessToolsProps {
  answer: CertaintyAnswer;
  /** ranked stations */
  places: number;
  /** of the steepest declines */
  k: number;
  onK: (k: number) => void;
}

/** Beside the lists' tabs: how many of the steepest are asked after, how far the rank spans are, and what they say. */
export function SurenessTools({ answer, places, k, onK }: SurenessToolsProps) {
  return (
    <div className={styles.tools}>
      <Steepest places={places} k={k} onK={onK} />
      {answer.view ? <Help replicates={answer.view.replicates} /> : <Wait {...answer} />}
    </div>
  );
}

function Steepest({ places, k, onK }: Omit<SurenessToolsProps, 'answer'>) {
  const most = Math.min(MOST_STEEPEST, places);
  // what is being typed may be no number yet
  const [typed, setTyped] = useState<string | null>(null);
  return (
    <label className={styles.steepest}>
      Among the{' '}
      <input
        type="number"
        className={ui.input}
        min={1}
        max={most}
        value={typed ?? k}
        onChange={({ currentTarget: { value, valueAsNumber: next } }) => {
          setTyped(value);
          if (Number.isInteger(next) && next >= 1 && next <= most) onK(next);
        }}
        onBlur={() => setTyped(null)}
      />{' '}
      steepest<span className="visually-hidden"> declines</span>
    </label>
  );
}

function Wait({ pending, progress, problem, cancelled, cancel, retry }: CertaintyAnswer): ReactNode {
  if (problem !== null) {
    return (
      <p role="alert">
        The rank spans could not be worked out: {problem} <Plain onClick={retry}>Try again</Plain>
      </p>
    );
  }
  if (cancelled) {
    return (
      <p role="status">
        The rank spans were cancelled. <Plain onClick={retry}>Work them out after all</Plain>
      </p>
    );
  }
  if (!pending) return null;
  const share = progress?.share ?? null;
  const left = progress?.secondsLeft ?? null;
  return (
    <div className={styles.wait}>
      <span role="status">Working out the rank spans</span>
      {progress && (
        <>
          <progress value={share ?? 0} max={1} aria-label="Rank spans" />
          <span>
            {percent(share ?? 0)}
            {left !== null && `, ${fixed(Math.max(1, left))} s left`}
          </span>
          <Plain onClick={cancel}>Cancel</Plain>
        </>
      )}
    </div>
  );
}

function Plain({ onClick, children }: { onClick(): void; children: string }) {
  return (
    <button type="button" className={ui.plain} onClick={onClick}>
      {children}
    </button>
  );
}

/** What a rank span is, and what it is not. */
function Help({ replicates }: { replicates: number }) {
  return (
    <Popover.Root>
      <Popover.Trigger className={ui.plain}>What these say</Popover.Trigger>
      <Popover.Portal>
        <Popover.Positioner sideOffset={6} align="end" collisionPadding={12} className={ui.layer}>
          <Popover.Popup className={ui.popup}>
            <div className={styles.help}>
              <Popover.Title>How sure is a place?</Popover.Title>
              <p>
                The rank span is the 90 % interval of a station’s place, from {fixed(replicates)} simulated regions that
                share weather and carry over from year to year as these records do. The guarantee is an average over
                stations: 90 of 100 spans hold the true place, and no single one is promised. A place may lie outside
                its own span: a steep figure from a scattered record is believed less than it says.
              </p>
              <p>
                Steadiness is the share of windows of at least 15 usable years that agree with the sign of the trend.
                Such windows overlap, so they are not independent evidence.
              </p>
              <p>
                The detectable trend is the one that the record would have shown in four cases of five. Below it, “may
                be chance” is not “no change”.
              </p>
            </div>
          </Popover.Popup>
        </Popover.Positioner>
      </Popover.Portal>
    </Popover.Root>
  );
}
