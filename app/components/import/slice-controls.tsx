'use client';
import { useState } from 'react';
import type { Mapping } from '@/lib/intake/types';
import { ScrollFrame } from '../scroll-frame.tsx';
import ui from '../ui.module.css';
import styles from './mapping.module.css';
import { type NamedSlice, piecesOf, placesOfSlices, type SliceName, sliceFrom, slicesOf } from './slices.ts';

interface Props {
  mapping: Mapping;
  lines: readonly string[];
  asked: string | null;
  onPlaces(places: Partial<Mapping>): void;
}

/** Where the fields of a fixed-width file stand: by number, with the effect on the first lines. */
export function SliceControls({ mapping, lines, asked, onPlaces }: Props) {
  const [drafts, setDrafts] = useState(() => slicesOf(mapping).map(draftOf));
  const slices: NamedSlice[] = drafts.map(({ name, first, last }) => ({ name, slice: sliceFrom(first, last) }));
  const change = (name: SliceName, part: Partial<Draft>) => {
    const next = drafts.map((draft) => (draft.name === name ? { ...draft, ...part } : draft));
    setDrafts(next);
    if (next.some(isWrong)) return;
    const places = placesOfSlices(
      next.map(({ name: of, first, last }) => ({ name: of, slice: sliceFrom(first, last) })),
      mapping,
    );
    if (places) onPlaces(places);
  };
  return (
    <fieldset className={styles.slices}>
      <legend>Where the fields stand, by character</legend>
      {asked && <p className={styles.asked}>{asked}</p>}
      <ul className={styles.sliceList}>
        {drafts.map((draft) => (
          <SliceInput key={draft.name} draft={draft} onChange={(part) => change(draft.name, part)} />
        ))}
      </ul>
      <Ruler lines={lines} slices={slices} />
    </fieldset>
  );
}

interface Draft {
  name: SliceName;
  first: string;
  last: string;
}

const draftOf = ({ name, slice }: NamedSlice): Draft => ({
  name,
  first: slice === null ? '' : String(slice[0] + 1),
  last: slice === null ? '' : String(slice[1]),
});

const isEmpty = ({ first, last }: Draft): boolean => first === '' && last === '';
const isWrong = (draft: Draft): boolean => !isEmpty(draft) && sliceFrom(draft.first, draft.last) === null;

function SliceInput({ draft, onChange }: { draft: Draft; onChange(part: Partial<Draft>): void }) {
  const wrong = isWrong(draft);
  const missing = isEmpty(draft) && draft.name !== 'flag';
  const below = `slice-${draft.name}-below`;
  const input = (key: 'first' | 'last', words: string) => (
    <input
      className={ui.input}
      type="number"
      min={1}
      aria-label={`${draft.name}, ${words} character`}
      aria-invalid={wrong || missing}
      aria-describedby={wrong || missing ? below : undefined}
      value={draft[key]}
      onChange={(event) => onChange({ [key]: event.target.value })}
    />
  );
  return (
    <li data-role={draft.name}>
      <span className={styles.sliceName}>{draft.name}</span>
      {input('first', 'first')}
      <span aria-hidden="true">to</span>
      {input('last', 'last')}
      {(wrong || missing) && (
        <p id={below} className={styles.asked}>
          {wrong ? 'The first character comes before the last one; counting begins at 1.' : 'This has to be told.'}
        </p>
      )}
    </li>
  );
}

const TICK = 10;

function Ruler({ lines, slices }: { lines: readonly string[]; slices: readonly NamedSlice[] }) {
  const length = Math.max(...lines.map((line) => line.length), 0);
  const ticks = Array.from({ length: Math.floor(length / TICK) }, (_, at) => String((at + 1) * TICK).padStart(TICK));
  return (
    <ScrollFrame className={styles.ruler} label="The first lines, with a ruler of characters">
      <pre aria-hidden="true" className={styles.ticks}>
        {ticks.join('')}
        {'\n'}
        {Array.from({ length }, (_, at) => ((at + 1) % TICK === 0 ? '|' : (at + 1) % 5 === 0 ? '+' : '·')).join('')}
      </pre>
      <pre>
        {lines
          .map((line, number) => ({ line, number }))
          .map(({ line, number }) => (
            <span key={number} className={styles.rulerLine}>
              {piecesOf(line, slices).map(({ text, start, name }) =>
                name === null ? (
                  text
                ) : (
                  <mark key={start} data-role={name} title={name}>
                    {text}
                  </mark>
                ),
              )}
              {'\n'}
            </span>
          ))}
      </pre>
    </ScrollFrame>
  );
}
