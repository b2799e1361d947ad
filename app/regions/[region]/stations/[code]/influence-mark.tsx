import type { Influence } from '@/lib/region/ranking-types';
import styles from './station-screen.module.css';

/** One small drawing an influence; the word always stands beside it. */
const DRAWINGS: Record<Influence, string> = {
  // a free wave
  natural: 'M1,9q3,-5 6,0t6,0',
  // a wall across the wave
  regulated: 'M1,10q2,-3 4,0M7,2v11M9,10q2,-3 4,0',
  // an arrow out of the water
  abstracted: 'M1,12h12M7,10V2m-3,3l3,-3l3,3',
  // an arrow into the water
  augmented: 'M1,12h12M7,2v8m-3,-3l3,3l3,-3',
  // a source
  'spring-fed': 'M7,12a4.5,4.5 0 1 1 .01,0M7,9V5',
  // roofs
  urban: 'M1,12V7l3,-3l3,3v5M7,12V5l3,-3l3,3v7',
  unknown: 'M4.5,5a2.5,2.5 0 1 1 3.2,2.4q-.7,.3 -.7,1.6M7,11.5v1',
};

export function InfluenceMark({ influence }: { influence: Influence }) {
  return (
    <svg className={styles.influence} viewBox="0 0 14 14" width="16" height="16" aria-hidden="true">
      <path d={DRAWINGS[influence]} fill="none" stroke="currentColor" strokeWidth="1.4" strokeLinejoin="round" />
    </svg>
  );
}
