import { count, fixed, percent } from '@/app/components/format';
import { ScrollFrame } from '@/app/components/scroll-frame';
import type { DependentPair } from '@/lib/region/regional-types';
import table from '../evidence-table.module.css';

interface Props {
  pairs: readonly DependentPair[];
  nameOf(code: string): string;
}

/** Which stations the independent set leaves out, and beside which. */
export function DependentPairs({ pairs, nameOf }: Props) {
  if (pairs.length === 0) return <p>No two ranked stations share so much water that one of them must be left out.</p>;
  return (
    <details className={table.details}>
      <summary>
        The independent set leaves out {count(pairs.length, 'station')} that {pairs.length === 1 ? 'shares' : 'share'}{' '}
        water with another
      </summary>
      <p className={table.note}>
        Of two stations on one river whose areas are more than half alike, or whose flows go together (correlation above
        0.95 once the season is taken out), the longer record is kept. A group without a row of its own for the
        independent set loses nobody by it, or everybody.
      </p>
      <ScrollFrame className={table.scroll} label="Stations that share water">
        <table className={table.table}>
          <thead>
            <tr>
              <th scope="col">Left out</th>
              <th scope="col">Kept</th>
              <th scope="col">Because</th>
            </tr>
          </thead>
          <tbody>
            {pairs.map(({ left, kept, reason, figure }) => (
              <tr key={`${left} ${kept}`}>
                <th scope="row">{nameOf(left)}</th>
                <td>{nameOf(kept)}</td>
                <td>
                  {reason === 'area-ratio'
                    ? `one river, the smaller area ${percent(figure)} of the larger`
                    : `flows correlated by ${fixed(figure, 3)}`}
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      </ScrollFrame>
    </details>
  );
}
