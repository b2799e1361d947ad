'use client';
import type { ReactNode } from 'react';
import { percent, range } from '@/app/components/format';
import { LongWait } from '@/app/components/long-wait';
import { WarningNote } from '@/app/components/notes';
import { Segmented } from '@/app/components/segmented';
import type { LongResult } from '@/app/components/use-long-result';
import type { ChanceMethod, RegionalAnswers } from '@/lib/region/regional-types';
import styles from '../evidence.module.css';
import { Section } from '../section.tsx';
import { noInfluenceKnown, shownGroups } from '../shown-groups.ts';
import { ChanceTable } from './chance-table.tsx';
import { DependentPairs } from './dependent-pairs.tsx';
import { GroupSentences } from './group-sentences.tsx';

const METHODS: readonly { value: ChanceMethod; label: string; title: string }[] = [
  {
    value: 'permutation',
    label: 'years shuffled',
    title: 'The years are put into another order, the same at all stations',
  },
  {
    value: 'sieve',
    label: 'years drawn anew, with carry-over',
    title:
      'Years without trend are drawn anew, the same for all stations, and carry over from one to the next as these do',
  },
];

interface Props {
  answer: LongResult<RegionalAnswers>;
  method: ChanceMethod;
  onMethod(method: ChanceMethod): void;
  alpha: string;
  csv: string | null;
  nameOf(code: string): string;
  /** the tool by which a group is drawn */
  drawing: ReactNode;
}

/** Whether more stations fall or rise than chance would bring, for every group of them. */
export function ChanceSection({ answer, method, onMethod, alpha, csv, nameOf, drawing }: Props) {
  const { value } = answer;
  return (
    <Section
      id="chance"
      title="Beyond chance"
      lead={`Where nothing has changed some stations fall at the ${alpha} level all the same, and neighbours that share weather do so together. So the years are played again without any trend, the same years for all stations, and the stations that fall are counted each time.`}
      csv={csv}
      csvName="Groups CSV"
      method="beyond-chance"
    >
      <Segmented label="Chance is imitated by" value={method} options={METHODS} onChange={onMethod} />
      <LongWait answer={answer} title="Playing the years again" failed="Chance could not be told" />
      {value && (
        <div className={styles.body} aria-busy={answer.pending}>
          {value.refused !== null && <WarningNote>{value.refused}</WarningNote>}
          <ChanceTable groups={shownGroups(value.groups)} alpha={alpha} />
          {value.trueLevel && (
            <p className={styles.note}>
              Where no station has a trend this finds one all the same in{' '}
              {range(percent(value.trueLevel[0]), percent(value.trueLevel[1]))} of regions, simulated, not in 5 %.
              Falling and rising are counted apart, and each station’s p is its own here: the counts by adjusted p are
              another question, answered in the second sentence of each group.
            </p>
          )}
          {noInfluenceKnown(value.groups) && (
            <p className={styles.note}>
              The influence of no ranked station is known. Once it stands in their facts or in a station list, natural
              and regulated stations are counted apart here.
            </p>
          )}
          {value.drying && <p className={styles.note}>{value.drying.sentence}</p>}
          {drawing}
          <GroupSentences groups={value.groups} />
          <DependentPairs pairs={value.pairs} nameOf={nameOf} />
        </div>
      )}
    </Section>
  );
}
