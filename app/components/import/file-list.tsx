'use client';
import { useState } from 'react';
import type { ImportProblem } from '@/lib/jobs/import-types';
import type { UploadedFile } from '@/lib/jobs/upload-types';
import { count, fixed } from '../format.ts';
import { Segmented } from '../segmented.tsx';
import ui from '../ui.module.css';
import styles from './mapping.module.css';
import { sizeText } from './size-text.ts';
import { unitText } from './unit-text.ts';
import { KIND_WORDS, LAYOUT_WORDS } from './words.ts';

/** How a file stands, in words and as a sign. */
export const STANDS = {
  ready: { sign: '✓', words: 'ready' },
  asks: { sign: '?', words: 'asks something' },
  unreadable: { sign: '✕', words: 'cannot be read' },
  unseen: { sign: '…', words: 'is looked at' },
  out: { sign: '–', words: 'left out' },
} as const;
export type Stands = keyof typeof STANDS;

/** How a file stands: what its beginning tells, and what an import that read all of it told. */
export function standsOf(file: UploadedFile, out: boolean, refusal: ImportProblem | undefined): Stands {
  if (out) return 'out';
  if (file.state === 'ready' && refusal) return refusal.problem?.needs ? 'asks' : 'unreadable';
  return file.state;
}

interface Props {
  files: readonly UploadedFile[];
  leftOut: ReadonlySet<string>;
  refusals: Readonly<Record<string, ImportProblem>>;
  selected: string | null;
  onSelect(file: string): void;
  onLeaveOut(file: string, out: boolean): void;
}

/** Files listed at once; a filter finds the others. */
const MOST_LISTED = 300;
/** From this many files on there is a filter. */
const FILTER_FROM = 6;

type Filter = 'all' | 'asks' | 'unreadable';

/** Every file of the upload: what it is, and how it stands. */
export function FileList({ files, leftOut, refusals, selected, onSelect, onLeaveOut }: Props) {
  const [filter, setFilter] = useState<Filter>('all');
  const standing = files.map((file) => ({ file, stands: standsOf(file, leftOut.has(file.file), refusals[file.file]) }));
  const number = (wanted: Stands) => standing.filter(({ stands }) => stands === wanted).length;
  const listed = standing.filter(({ file, stands }) => filter === 'all' || stands === filter || file.file === selected);
  return (
    <nav aria-label="Files" className={styles.list}>
      {files.length >= FILTER_FROM && (
        <Segmented<Filter>
          label="Show files"
          value={filter}
          options={[
            { value: 'all', label: `All ${fixed(files.length)}` },
            { value: 'asks', label: `Asking ${fixed(number('asks'))}` },
            { value: 'unreadable', label: `Unreadable ${fixed(number('unreadable'))}` },
          ]}
          onChange={setFilter}
        />
      )}
      <ul>
        {listed.slice(0, MOST_LISTED).map(({ file, stands }) => (
          <li key={file.file} data-stands={stands} aria-current={file.file === selected || undefined}>
            <input
              type="checkbox"
              className={styles.take}
              aria-label={`Take ${file.file}`}
              checked={stands !== 'out'}
              onChange={(event) => onLeaveOut(file.file, !event.target.checked)}
            />
            <button type="button" aria-pressed={file.file === selected} onClick={() => onSelect(file.file)}>
              <span className={styles.fileName}>{file.file}</span>
              <span className={styles.what}>{whatItIs(file)}</span>
              <span className={styles.stands}>
                <span aria-hidden="true">{STANDS[stands].sign}</span> {STANDS[stands].words}
              </span>
            </button>
          </li>
        ))}
      </ul>
      {listed.length > MOST_LISTED && (
        <p className={ui.hint}>and {count(listed.length - MOST_LISTED, 'file')} more; those that ask are found above</p>
      )}
    </nav>
  );
}

/** Example: "daily values in m³/s, one row a station and day, 3 stations" */
function whatItIs({ kind, layout, unit, stations, count: counted, size }: UploadedFile): string {
  if (kind === null) return sizeText(size);
  if (kind === 'registry')
    return counted === null ? KIND_WORDS.registry : `${KIND_WORDS.registry}, ${count(counted, 'station')}`;
  if (kind === 'layer') return counted === null ? KIND_WORDS.layer : `${KIND_WORDS.layer}, ${count(counted, 'shape')}`;
  const named = stations.length === 1 ? `station ${stations[0]}` : `stations ${stations.slice(0, 2).join(', ')}…`;
  return [
    unit ? `${KIND_WORDS.flows} in ${unitText(unit)}` : KIND_WORDS.flows,
    layout ? LAYOUT_WORDS[layout] : '',
    stations.length > 0 ? named : '',
  ]
    .filter(Boolean)
    .join(', ');
}
