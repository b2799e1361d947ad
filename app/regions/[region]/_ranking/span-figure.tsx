import styles from './sureness.module.css';

interface SpanFigureProps {
  /** ends of the rank span and the place itself, 1 to `places` */
  low: number;
  high: number;
  rank: number | null;
  places: number;
}

const WIDTH = 76;
const HEIGHT = 12;
/** Room for half a dot at each end. */
const PAD = 4;

/** A rank span as a slim bar on the scale of all places, the place itself as a dot. Decoration: say the figures beside it. */
export function SpanFigure({ low, high, rank, places }: SpanFigureProps) {
  const x = (place: number) => PAD + ((place - 1) / Math.max(1, places - 1)) * (WIDTH - 2 * PAD);
  const middle = HEIGHT / 2;
  return (
    <svg viewBox={`0 0 ${WIDTH} ${HEIGHT}`} width={WIDTH} height={HEIGHT} aria-hidden="true" className={styles.span}>
      <path d={`M${PAD} ${middle}H${WIDTH - PAD}`} className={styles.scale} />
      <path d={`M${x(low).toFixed(1)} ${middle}H${x(high).toFixed(1)}`} className={styles.bar} />
      {rank !== null && <circle cx={x(rank).toFixed(1)} cy={middle} r="3.4" className={styles.dot} />}
    </svg>
  );
}

/** A probability as a small bar. Decoration: say the figure beside it. */
export function ShareBar({ share }: { share: number }) {
  return (
    <svg viewBox="0 0 48 6" width="48" height="6" aria-hidden="true" className={styles.share}>
      <rect width="48" height="6" className={styles.ground} />
      <rect width={(48 * share).toFixed(1)} height="6" className={styles.filled} />
    </svg>
  );
}
