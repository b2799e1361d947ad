'use client';
import { useState } from 'react';
import type { FoundFacts } from '@/lib/intake/types';
import type { FileChoices } from '@/lib/jobs/import-types';
import type { PreviewProblem } from '@/lib/jobs/upload-types';
import { QUANTITIES } from '@/lib/series/quantities';
import { significant } from '../format.ts';
import { type Asked, CONTROL_WORDS, CONTROLS, type Control, RARE, sortOut } from './asked.ts';
import { type ChoicesEdit, shownMapping } from './choices-edit.ts';
import { CodeMatches } from './code-matches.tsx';
import { Columns } from './columns.tsx';
import { Choice } from './field.tsx';
import { FlagMeanings } from './flag-meanings.tsx';
import { MainControls } from './main-controls.tsx';
import styles from './mapping.module.css';
import { OtherQuantities } from './other-quantities.tsx';
import { ProblemNote } from './problem-note.tsx';
import { RareControls } from './rare-controls.tsx';
import { SavedMappings } from './saved-mappings.tsx';
import { SeriesChoice } from './series-choice.tsx';
import type { FileSight } from './use-looks.ts';
import { isDocument, LAYOUT_WORDS, QUANTITY_WORDS, TEXT_LAYOUTS } from './words.ts';

interface Props {
  sight: FileSight;
  /** as said so far; the sight may be of a moment before */
  choices: FileChoices;
  problems: readonly PreviewProblem[];
  region: string | null;
  change(edit: ChoicesEdit): void;
}

/** How a file of daily values is read: every term of it, and the first rows as they are understood by these. */
export function FlowsDetail({ sight, choices, problems, region, change }: Props) {
  const [changed, setChanged] = useState<Control | null>(null);
  /** counts the changes that come from elsewhere than the controls, which then begin anew */
  const [round, setRound] = useState(0);
  const { inspection } = sight;
  const recognised = inspection?.mapping ?? null;
  const station = recognised && shownMapping(recognised, choices).station.from;
  const { asked, others } = recognised
    ? sortOut(problems, { stale: sight.stale, changed, document: isDocument(recognised.layout), station })
    : { asked: {}, others: problems };
  const renewed = (edit: ChoicesEdit) => {
    setRound(round + 1);
    change(edit);
  };
  const notes = others.map((problem) => (
    <ProblemNote key={problem.message} problem={problem} answeredHere={problem.problem.needs === 'codes'}>
      {problem.problem.needs === 'codes' && (
        <CodeMatches pairs={problem.problem.pairs ?? []} onTake={() => change({ matchCodes: true })} />
      )}
    </ProblemNote>
  ));
  if (!inspection || !recognised) {
    return (
      <>
        {notes}
        <Unrecognised sight={sight} choices={choices} change={change} />
      </>
    );
  }
  const mapping = shownMapping(recognised, choices);
  const say = (control: Control, edit: ChoicesEdit) => {
    setChanged(control);
    change(edit);
  };
  const controls = { inspection, mapping, choices, asked, change: say };
  const isSaid = Object.keys(choices).length > 0;
  return (
    <>
      {notes}
      <ToAnswer asked={asked} />
      {asked.quantity && isDocument(mapping.layout) && (
        <SeriesChoice series={inspection.others} onTake={(taken) => renewed({ mapping: taken })} />
      )}
      <div className={styles.controls} key={`main ${round}`}>
        <MainControls {...controls} />
      </div>
      <details className={styles.rare} open={RARE.some((control) => asked[control] !== undefined) || undefined}>
        <summary>Signs, missing values and other terms</summary>
        <div className={styles.controls} key={`rare ${round}`}>
          <RareControls {...controls} />
        </div>
      </details>
      <Columns key={`columns ${round}`} {...controls} sight={sight} renewed={renewed} />
      <FlagMeanings
        understood={inspection.understood}
        flags={mapping.flags}
        onChange={(flags) => change({ mapping: { flags } })}
      />
      {!(asked.quantity && isDocument(mapping.layout)) && (
        <OtherQuantities
          key={`also ${round}`}
          others={inspection.others}
          mapping={mapping}
          asked={asked.also}
          onChange={(also) => say('also', { mapping: { also } })}
        />
      )}
      <Facts facts={inspection.facts} />
      {isSaid && (
        <p>
          <button type="button" className={styles.reset} onClick={() => renewed({ reset: true })}>
            Go back to what was recognised
          </button>
        </p>
      )}
      <SavedMappings region={region} mapping={mapping} onUse={(saved) => renewed({ reset: true, mapping: saved })} />
    </>
  );
}

/** What is asked below, in short. */
function ToAnswer({ asked }: { asked: Asked }) {
  const controls = CONTROLS.filter((control) => asked[control] !== undefined);
  if (controls.length === 0) return null;
  return (
    <p className={styles.toAnswer}>
      <strong>To be answered:</strong> {controls.map((control) => CONTROL_WORDS[control]).join(', ')}.
    </p>
  );
}

/** A file whose layout is not told: a person may say what it is, unless it is a document, which says so itself. */
function Unrecognised({ sight, choices, change }: Pick<Props, 'sight' | 'choices' | 'change'>) {
  if (/^\s*[<{]/.test(sight.lines.join('\n'))) return <FirstLines lines={sight.lines} />;
  const layout = TEXT_LAYOUTS.find((one) => one === choices.mapping?.layout) ?? null;
  return (
    <>
      <div className={styles.controls}>
        <Choice
          label="Layout"
          none="as recognised"
          value={layout}
          options={TEXT_LAYOUTS.map((value) => ({ value, words: LAYOUT_WORDS[value] }))}
          onChange={(value) => change({ mapping: { layout: value ?? undefined } })}
        />
        <Choice
          label="Quantity"
          value={choices.mapping?.quantity ?? 'flow'}
          options={QUANTITIES.map((value) => ({ value, words: QUANTITY_WORDS[value] }))}
          onChange={(quantity) => change({ mapping: { quantity: quantity ?? undefined } })}
        />
      </div>
      <FirstLines lines={sight.lines} />
    </>
  );
}

function FirstLines({ lines }: { lines: readonly string[] }) {
  return lines.length === 0 ? null : <pre className={styles.lines}>{lines.join('\n')}</pre>;
}

/** What the file says of its stations beside their days. */
function Facts({ facts }: { facts: readonly FoundFacts[] }) {
  if (facts.length === 0) return null;
  return (
    <section aria-label="Stations as the file describes them" className={styles.facts}>
      <h4>The file says of its stations</h4>
      <ul>
        {facts.slice(0, 10).map((fact) => (
          <li key={fact.code}>
            <b>{fact.code}</b> {factWords(fact)}
          </li>
        ))}
      </ul>
    </section>
  );
}

function factWords({ name, river, latitude, longitude, areaKm2 }: FoundFacts): string {
  const place = latitude === undefined || longitude === undefined ? '' : `at ${latitude}, ${longitude}`;
  const area = areaKm2 === undefined ? '' : `${significant(areaKm2, 5)} km²`;
  return [name, river, place, area].filter(Boolean).join(', ');
}
