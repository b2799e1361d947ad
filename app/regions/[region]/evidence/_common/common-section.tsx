'use client';
import { fixed, pValue, signed, significant } from '@/app/components/format';
import { LongWait } from '@/app/components/long-wait';
import { ScrollFrame } from '@/app/components/scroll-frame';
import type { LongResult } from '@/app/components/use-long-result';
import type { GroupAnswer, RegionalAnswers } from '@/lib/region/regional-types';
import type { FigureWords } from '../../_ranking/figure-words.ts';
import styles from '../evidence.module.css';
import table from '../evidence-table.module.css';
import { Section } from '../section.tsx';
import { SetWords } from '../set-words.tsx';
import { shownGroups } from '../shown-groups.ts';
import { SignBar } from './sign-bar.tsx';

interface Props {
  answer: LongResult<RegionalAnswers>;
  /** what the stations are ranked by */
  figure: FigureWords;
  csv: string | null;
}

/** Whether the stations of a group share one trend: the regional Kendall test, and beside it how far they agree. */
export function CommonSection({ answer, figure, csv }: Props) {
  const { value } = answer;
  return (
    <Section
      id="common"
      title="One common trend"
      lead="The regional Kendall test asks whether all stations of a group move one way. It respects that neighbours share weather and that low flows carry over from year to year. It assumes one trend common to all: where as many stations rise as fall, its answer means little, so the signs stand beside it."
      csv={csv}
      csvName="Groups CSV"
      method="regional-kendall"
    >
      <p className={styles.note}>
        <LongWait
          answer={answer}
          title="Taking the stations together"
          failed="The common trend could not be tested"
          brief
        />
      </p>
      {value && (
        <div className={styles.body} aria-busy={answer.pending}>
          <ScrollFrame className={table.scroll} label="Regional Kendall test by group">
            <table className={table.table}>
              <caption>
                <span>Regional Kendall test of every group, with the signs of its stations’ slopes</span>
              </caption>
              <thead>
                <tr>
                  <th scope="col">Stations</th>
                  <th scope="col" className={table.number}>
                    Ranked
                  </th>
                  <th scope="col">Slopes falling, level, rising</th>
                  <th scope="col" className={table.number}>
                    Median, {figure.heading}
                  </th>
                  <th scope="col" className={table.number}>
                    z
                  </th>
                  <th scope="col" className={table.number}>
                    p
                  </th>
                  <th scope="col" className={table.number}>
                    Mean lag-1 correlation
                  </th>
                  <th scope="col" className={table.number}>
                    Factor on the variance
                  </th>
                </tr>
              </thead>
              <tbody>
                {shownGroups(value.groups).map((group) => (
                  <CommonRow key={`${group.id} ${group.set}`} group={group} figure={figure} />
                ))}
              </tbody>
            </table>
          </ScrollFrame>
        </div>
      )}
    </Section>
  );
}

function CommonRow({ group, figure }: { group: GroupAnswer; figure: FigureWords }) {
  const { kendall, signs, ranked } = group;
  return (
    <tr data-group={group.id} data-set={group.set}>
      <th scope="row">
        <SetWords group={group} />
      </th>
      <td className={table.number}>{fixed(ranked)}</td>
      <td>
        <SignBar {...signs} />
      </td>
      <td className={table.number}>{figure.text(kendall?.medianFigure ?? null)}</td>
      <td className={table.number}>{signed(kendall?.z, 2)}</td>
      <td className={table.number}>{pValue(kendall?.p)}</td>
      <td className={table.number}>{fixed(kendall?.r1, 2)}</td>
      <td className={table.number}>{significant(kendall?.serialFactor)}</td>
    </tr>
  );
}
