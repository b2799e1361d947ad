'use client';
import { type ReactNode, useState } from 'react';
import { Segmented } from '@/app/components/segmented';
import styles from './map-screen.module.css';

type Shown = 'both' | 'map' | 'ranking';
const CHOICES: readonly { value: Shown; label: string }[] = [
  { value: 'both', label: 'Both' },
  { value: 'map', label: 'Map' },
  { value: 'ranking', label: 'Ranking' },
];

/** On a phone map and ranking stand one above the other, or alone. */
export function SmallScreen({ map, ranking }: { map: ReactNode; ranking: ReactNode }) {
  const [shown, setShown] = useState<Shown>('both');
  return (
    <div className={styles.stack}>
      <div className={styles.switch}>
        <Segmented<Shown> label="Show" value={shown} options={CHOICES} onChange={setShown} />
      </div>
      {/* the map is hidden rather than taken away: it keeps its view, and the ranking goes on following it */}
      <div className={styles.stackMap} data-alone={shown === 'map'} hidden={shown === 'ranking'}>
        {map}
      </div>
      {shown !== 'map' && <div className={styles.stackRanking}>{ranking}</div>}
    </div>
  );
}
