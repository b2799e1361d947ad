'use client';
import { FILE_KINDS, type FileChoices, type ImportProblem } from '@/lib/jobs/import-types';
import type { PreviewProblem } from '@/lib/jobs/upload-types';
import { count } from '../format.ts';
import { Loading } from '../notes.tsx';
import ui from '../ui.module.css';
import type { ChoicesEdit } from './choices-edit.ts';
import { FlowsDetail } from './flows-detail.tsx';
import styles from './mapping.module.css';
import { ProblemNote } from './problem-note.tsx';
import { LayerDetail, RegistryDetail } from './registry-detail.tsx';
import { sizeText } from './size-text.ts';
import type { FileSight } from './use-looks.ts';
import { KIND_WORDS } from './words.ts';

interface Props {
  file: string;
  sight: FileSight | null;
  choices: FileChoices;
  /** why an import that read all of the file did not take it */
  refusal: ImportProblem | undefined;
  busy: boolean;
  region: string | null;
  /** how many other files are laid out like this one */
  alike: number;
  together: boolean;
  onTogether(together: boolean): void;
  change(edit: ChoicesEdit): void;
}

/** One file as it is understood, and all that can be said about it. */
export function FileDetail({ file, sight, choices, refusal, busy, alike, together, onTogether, ...rest }: Props) {
  const { region, change } = rest;
  return (
    <article className={styles.detail} aria-label={file} aria-busy={busy}>
      <header className={styles.detailHead}>
        <h3>{file}</h3>
        {sight?.kind && (
          <label className={styles.kind}>
            <span>is taken for</span>
            <select
              className={ui.select}
              value={sight.kind}
              onChange={(event) => change({ own: true, kind: FILE_KINDS.find((kind) => kind === event.target.value) })}
            >
              {FILE_KINDS.map((kind) => (
                <option key={kind} value={kind}>
                  {KIND_WORDS[kind]}
                </option>
              ))}
            </select>
          </label>
        )}
        {sight && <span className={ui.hint}>{sizeText(sight.size)}</span>}
      </header>
      {alike > 0 && (
        <label className={ui.check}>
          <input type="checkbox" checked={together} onChange={(event) => onTogether(event.target.checked)} />
          What is said here holds for the {count(alike, 'other file')} laid out like this one
        </label>
      )}
      {sight === null ? (
        <Loading>Looking at the file…</Loading>
      ) : (
        <Body key={`${file} ${sight.kind}`} {...{ sight, choices, region, change, refusal }} />
      )}
    </article>
  );
}

type BodyProps = Pick<Props, 'choices' | 'region' | 'change' | 'refusal'> & { sight: FileSight };

function Body({ sight, choices, region, change, refusal }: BodyProps) {
  const told = sight.problems.length === 0 && refusal?.problem ? [refusal as PreviewProblem] : sight.problems;
  if (sight.kind === 'flows') return <FlowsDetail {...{ sight, choices, region, change }} problems={told} />;
  if (sight.kind === 'registry')
    return <RegistryDetail preview={{ ...sight, choices, problems: told }} change={change} />;
  return (
    <>
      {told.map((problem) => (
        <ProblemNote key={problem.message} problem={problem} answeredHere={false} />
      ))}
      {sight.layer && <LayerDetail layer={sight.layer} />}
    </>
  );
}
