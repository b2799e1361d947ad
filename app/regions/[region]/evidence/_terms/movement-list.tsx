'use client';
import { count, fixed } from '@/app/components/format';
import { ErrorNote, Loading } from '@/app/components/notes';
import { useAnswer } from '@/app/components/use-answer';
import type { RankingMovement } from '@/lib/region/window-types';
import { movementWords } from './term-words.ts';
import styles from './terms.module.css';

/** As many as are named; the rest is in the file. */
const NAMED = 12;

/** Who moved in the ranking, furthest first: from the place on the other terms to the one on those at hand. */
export function MovementList({ address, label }: { address: string; label: string }) {
  const { value, problem } = useAnswer<RankingMovement>(address);
  if (problem) return <ErrorNote title="Who moved could not be told">{problem}</ErrorNote>;
  if (!value) return <Loading>Comparing the places…</Loading>;
  const { movements, medianMove, rankedBoth } = value;
  const moved = movements.filter(({ moved }) => moved !== 0);
  const csv = `${address}&format=csv`;
  return (
    <div className={styles.moved}>
      <p>
        {count(rankedBoth, 'station is', 'stations are')} ranked on both; half of them move by{' '}
        {fixed(medianMove, Number.isInteger(medianMove) ? 0 : 1)} {medianMove === 1 ? 'place' : 'places'} or fewer.{' '}
        <a href={csv} download aria-label={`Movement CSV: ${label}`}>
          Movement CSV
        </a>
      </p>
      <ol>
        {moved.slice(0, NAMED).map((movement) => (
          <li key={movement.code}>{movementWords(movement, { before: 'there', after: 'here' })}</li>
        ))}
      </ol>
      {moved.length > NAMED && <p>And {fixed(moved.length - NAMED)} more, in the file.</p>}
    </div>
  );
}
