'use client';
import { useQueryStates } from 'nuqs';
import { useMemo, useState } from 'react';
import { count } from '@/app/components/format';
import { Empty, ErrorNote, Loading } from '@/app/components/notes';
import ui from '@/app/components/ui.module.css';
import { useAnswer } from '@/app/components/use-answer';
import type { ResolvedBasis } from '@/lib/basis';
import { FINDING_KINDS, type FindingKind } from '@/lib/checks/finding';
import type { FindingRow } from '@/lib/jobs/records-types';
import screen from '../records-screen.module.css';
import type { NamedStation } from '../records-screen.tsx';
import { FINDING_STATES, recordsState } from '../records-state.ts';
import { AnswerDialog, type AskedAnswer } from './answer-dialog.tsx';
import { CheckAgain } from './check-again.tsx';
import { KIND_WORDS, STATE_WORDS } from './finding-words.ts';
import styles from './findings.module.css';
import { countFindings, groupFindings, type StationCounts } from './group-findings.ts';
import { StationFindings } from './station-findings.tsx';

interface Props {
  slug: string;
  basis: ResolvedBasis;
  stations: readonly NamedStation[];
  version: number;
  onChanged(): void;
}

/** Stations put into the page at once. */
const PAGE = 15;

/** What the checks found on the region's records, and what people answered. */
export function FindingsSection({ slug, basis, stations, version, onChanged }: Props) {
  const [{ kind, state, q, station, finding }, set] = useQueryStates(recordsState);
  const [shown, setShown] = useState(PAGE);
  const [asked, setAsked] = useState<AskedAnswer | null>(null);
  const address = `/api/regions/${encodeURIComponent(slug)}/findings`;
  const { value, problem } = useAnswer<{ stations: StationCounts[] }>(`${address}/stations`, version);
  const byStation = value?.stations;
  const led = finding === null ? null : station;
  const groups = useMemo(
    () => groupFindings(byStation ?? [], stations, { kind, state, search: q }, led),
    [byStation, stations, kind, state, q, led],
  );
  if (problem) return <ErrorNote title="The findings could not be read">{problem}</ErrorNote>;
  if (!byStation) return <Loading>Reading the findings…</Loading>;
  const counts = countFindings(byStation);
  const total = counts.open + counts.rejected + counts.accepted + counts.noted;
  const filtered = groups.reduce((sum, group) => sum + group.count, 0);

  return (
    <div className={styles.section}>
      <p className={styles.plain}>
        The program marks what looks wrong and never deletes a value. Days under a finding carry the suspect flag, which
        the basis may exclude; a step says nothing against any one day. Rejected days count as missing, accepted ones
        lose the flag, and every answer can be undone.
      </p>
      <div className={screen.tools}>
        <label className={ui.label}>
          Kind
          <select
            className={ui.select}
            value={kind ?? ''}
            onChange={(event) => void set({ kind: (event.currentTarget.value || null) as FindingKind | null })}
          >
            <option value="">every kind</option>
            {FINDING_KINDS.map((value) => (
              <option key={value} value={value}>
                {KIND_WORDS[value]}
              </option>
            ))}
          </select>
        </label>
        <label className={ui.label}>
          Answered
          <select
            className={ui.select}
            value={state ?? ''}
            onChange={(event) => void set({ state: (event.currentTarget.value || null) as FindingRow['state'] | null })}
          >
            <option value="">open and answered</option>
            {FINDING_STATES.map((value) => (
              <option key={value} value={value}>
                {STATE_WORDS[value]}
              </option>
            ))}
          </select>
        </label>
        <label className={ui.label}>
          Find
          <input
            className={ui.input}
            type="search"
            placeholder="Name or code"
            value={q}
            onChange={(event) => void set({ q: event.currentTarget.value })}
          />
        </label>
        <CheckAgain slug={slug} onChanged={onChanged} />
        <a className={ui.button} href={`${address}?format=csv`} download>
          Findings CSV
        </a>
      </div>
      <p className={styles.who} role="status">
        {count(total, 'finding')}: {counts.open} open, {counts.rejected} rejected, {counts.accepted} accepted,{' '}
        {counts.noted} noted
        {filtered < total && ` · ${filtered} shown`}
      </p>
      {total === 0 && (
        <Empty title="The checks found nothing">
          <p>No record has a negative flow, a repeated block, a jump, a flat run or anything else they look for.</p>
        </Empty>
      )}
      {total > 0 && groups.length === 0 && (
        <Empty title="No finding answers the filter">
          <p>
            <button type="button" className={ui.plain} onClick={() => void set({ kind: null, state: null, q: null })}>
              Show all findings
            </button>
          </p>
        </Empty>
      )}
      {groups.slice(0, shown).map((group) => (
        <StationFindings
          key={group.station.code}
          slug={slug}
          group={group}
          filter={{ kind, state }}
          led={group.station.code === led ? finding : null}
          units={basis.units}
          yearStart={basis.yearStart}
          version={version}
          onAnswer={setAsked}
          onChanged={onChanged}
        />
      ))}
      {shown < groups.length && (
        <button type="button" className={ui.button} onClick={() => setShown(shown + PAGE)}>
          Show {Math.min(PAGE, groups.length - shown)} more of {count(groups.length, 'station')}
        </button>
      )}
      <AnswerDialog slug={slug} asked={asked} onClose={() => setAsked(null)} onChanged={onChanged} />
    </div>
  );
}
