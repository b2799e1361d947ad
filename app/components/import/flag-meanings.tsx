'use client';
import type { Mapping, UnderstoodRow } from '@/lib/intake/types';
import { FLAG_NAMES, type FlagName } from '@/lib/series/daily-series';
import { Choice } from './field.tsx';
import styles from './mapping.module.css';
import { flagWords } from './words.ts';

interface Props {
  understood: readonly UnderstoodRow[];
  flags: Mapping['flags'];
  onChange(flags: Mapping['flags']): void;
}

/** Flags listed: what stands in the first rows. */
const MOST_FLAGS = 12;

/** Meanings that a person may give a flag; rejecting days is done on the record, not on the way in. */
const MEANINGS = FLAG_NAMES.filter((name) => name !== 'rejected');

/** What the flags met in the first rows were understood as, each changeable. */
export function FlagMeanings({ understood, flags = {}, onChange }: Props) {
  const met = new Map(understood.filter(({ flag }) => flag !== '').map(({ flag, bits }) => [flag, bits]));
  const texts = [...new Set([...Object.keys(flags), ...met.keys()])].slice(0, MOST_FLAGS);
  if (texts.length === 0) return null;
  const give = (text: string, meaning: FlagName[] | undefined) => {
    const { [text]: _before, ...rest } = flags;
    const next = meaning === undefined ? rest : { ...rest, [text]: meaning };
    onChange(Object.keys(next).length > 0 ? next : undefined);
  };
  return (
    <details className={styles.rare} open={Object.keys(flags).length > 0 || undefined}>
      <summary>What the flags mean</summary>
      <div className={styles.controls}>
        {texts.map((text) => (
          <Choice
            key={text}
            label={`“${text}”`}
            none={
              flags[text] === undefined
                ? `${flagWords(met.get(text) ?? 0) || 'nothing special'} (as recognised)`
                : 'as recognised'
            }
            value={meaningOf(flags[text])}
            options={[
              { value: 'nothing', words: 'nothing special' },
              ...MEANINGS.map((name) => ({ value: name, words: name.replaceAll('-', ' ') })),
            ]}
            onChange={(value) =>
              give(text, value === null ? undefined : value === 'nothing' ? [] : [value as FlagName])
            }
          />
        ))}
      </div>
    </details>
  );
}

const meaningOf = (meaning: readonly FlagName[] | undefined): string | null =>
  meaning === undefined ? null : (meaning[0] ?? 'nothing');
