import { TONE_OPACITY } from './draw-windows.ts';
import styles from './start-end.module.css';
import type { ToneSteps } from './tone-steps.ts';

interface Props {
  steps: ToneSteps;
  /** what the steps are of. Example: "Z" */
  name: string;
  /** what a mark in a cell means; null where none is drawn */
  marked: string | null;
  /** what the ringed cell is */
  whole: string | null;
  /** what the two ways of the trend are called. Example: "earlier", "later" */
  falling?: string;
  rising?: string;
}

const SIDES = [
  { side: 'falling', order: [4, 3, 2, 1, 0] },
  { side: 'rising', order: [0, 1, 2, 3, 4] },
] as const;

/** What the colours of a start–end chart mean, from falling to rising, with its marks. */
export function ToneLegend({ steps, name, marked, whole, falling = 'falling', rising = 'rising' }: Props) {
  return (
    <ul className={styles.legend} aria-label="What the cells mean">
      {SIDES.map(({ side, order }) => (
        <li key={side}>
          {side === 'falling' && <span>{falling}</span>}
          <span className={styles.ramp} data-side={side} aria-hidden="true">
            {order.map((step) => (
              <span key={step} style={{ opacity: TONE_OPACITY[step] }} />
            ))}
          </span>
          {side === 'rising' && <span>{rising}</span>}
        </li>
      ))}
      <li>
        {name}: steps at {steps.join(', ')} either way
      </li>
      <li>
        <svg viewBox="0 0 20 14" width="20" height="14" aria-hidden="true">
          <path d="M0 13H9V1H20" className={styles.turn} />
        </svg>
        where the sign turns
      </li>
      {marked && (
        <li>
          <svg viewBox="0 0 22 14" width="22" height="14" aria-hidden="true">
            <path d="M0 3H9L4.5 11ZM13 11H22L17.5 3Z" className={styles.mark} />
          </svg>
          {marked}
        </li>
      )}
      {whole && (
        <li>
          <span className={styles.ring} aria-hidden="true" /> {whole}
        </li>
      )}
    </ul>
  );
}
