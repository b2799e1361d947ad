import { fixed, pValue } from '@/app/components/format';
import { ScrollFrame } from '@/app/components/scroll-frame';
import type { BeyondChance, GroupAnswer } from '@/lib/region/regional-types';
import table from '../evidence-table.module.css';
import { SetWords } from '../set-words.tsx';
import styles from './chance.module.css';
import { ChanceStrip, isBeyond } from './chance-strip.tsx';

/** How many stations of every group fall and rise, beside what chance brings. */
export function ChanceTable({ groups, alpha }: { groups: readonly GroupAnswer[]; alpha: string }) {
  return (
    <ScrollFrame className={table.scroll} label="Stations falling and rising beside chance, by group">
      <table className={table.table}>
        <caption>
          <span>
            Stations whose own p is under {alpha}, counted by group, beside the most that chance brings in 95 of 100
            regions without any trend
          </span>
        </caption>
        <thead>
          <tr>
            <th scope="col">Stations</th>
            <th scope="col" className={table.number}>
              Ranked
            </th>
            <th scope="col">Falling, and up to so many by chance</th>
            <th scope="col" className={table.number}>
              p
            </th>
            <th scope="col">Rising, and up to so many by chance</th>
            <th scope="col" className={table.number}>
              p
            </th>
          </tr>
        </thead>
        <tbody>
          {groups.map((group) => (
            <tr key={`${group.id} ${group.set}`} data-group={group.id} data-set={group.set}>
              <th scope="row">
                <SetWords group={group} />
              </th>
              <td className={table.number}>{fixed(group.ranked)}</td>
              <Counted found={group.falling} side="falling" ranked={group.ranked} />
              <Counted found={group.rising} side="rising" ranked={group.ranked} />
            </tr>
          ))}
        </tbody>
      </table>
    </ScrollFrame>
  );
}

function Counted({ found, side, ranked }: { found: BeyondChance | null; side: 'falling' | 'rising'; ranked: number }) {
  if (found === null) {
    return (
      <>
        <td className={table.quiet}>–</td>
        <td className={table.number}>–</td>
      </>
    );
  }
  const beyond = isBeyond(found);
  return (
    <>
      <td>
        <span className={styles.counted}>
          <span className={styles.figures}>
            <strong>{fixed(found.count)}</strong> <span className={table.quiet}>up to {fixed(found.bound)}</span>
          </span>
          <ChanceStrip found={found} side={side} ranked={ranked} />
          <span className={beyond ? styles.verdict : table.quiet}>{beyond ? 'beyond chance' : 'may be chance'}</span>
        </span>
      </td>
      <td className={table.number}>{pValue(found.p)}</td>
    </>
  );
}
