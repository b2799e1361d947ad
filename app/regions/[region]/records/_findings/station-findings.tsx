'use client';
import Link from 'next/link';
import { useSearchParams } from 'next/navigation';
import { useCallback, useState } from 'react';
import { count, type Units } from '@/app/components/format';
import { stationHref, yearHref } from '@/app/components/links';
import { ErrorNote, Loading } from '@/app/components/notes';
import ui from '@/app/components/ui.module.css';
import { useAnswer } from '@/app/components/use-answer';
import { parseIsoDate } from '@/lib/calendar/day';
import { lowFlowYearOfDay } from '@/lib/calendar/low-flow-year';
import { FINDING_KINDS } from '@/lib/checks/finding';
import type { FindingRow, MarkView } from '@/lib/jobs/records-types';
import { MARK_KINDS } from '@/lib/store/marks-on-flags';
import { MarkList } from '../_marks/mark-list.tsx';
import { MARK_WORDS, marksAddress } from '../_marks/marks-address.ts';
import type { AskedAnswer } from './answer-dialog.tsx';
import { FindingSketch } from './finding-sketch.tsx';
import { figuresOf, KIND_WORDS, STATE_WORDS } from './finding-words.ts';
import styles from './findings.module.css';
import { answersFilter, type FindingFilter, type FindingGroup as Group } from './group-findings.ts';

interface Props {
  slug: string;
  group: Group;
  filter: Pick<FindingFilter, 'kind' | 'state'>;
  /** id of the finding that a link leads to */
  led: string | null;
  units: Units;
  yearStart: number;
  version: number;
  onAnswer(asked: AskedAnswer): void;
  onChanged(): void;
}

/** Findings put into the page at once for one station. */
const PAGE = 20;

/** What the checks found on one record: each stretch drawn, its figures, what was answered, and the answers to give. */
export function StationFindings({ slug, group, filter, led, units, yearStart, version, onAnswer, onChanged }: Props) {
  const query = useSearchParams();
  const [shown, setShown] = useState(PAGE);
  const { station } = group;
  const { value, problem } = useAnswer<{ findings: FindingRow[] }>(
    `/api/regions/${encodeURIComponent(slug)}/findings?station=${encodeURIComponent(station.code)}`,
    version,
  );
  const findings = (value?.findings ?? []).filter((finding) => answersFilter(finding, filter));
  const upTo = Math.max(shown, findings.findIndex(({ id }) => id === led) + 1);
  // where a link leads is brought into sight, once
  const bring = useCallback((element: HTMLElement | null) => element?.scrollIntoView({ block: 'center' }), []);
  const several = FINDING_KINDS.map((kind) =>
    findings.filter((one) => one.kind === kind && one.state === 'open'),
  ).filter((some) => some.length > 1);
  const toYear = (finding: FindingRow) =>
    yearHref(slug, station.code, lowFlowYearOfDay(parseIsoDate(finding.first), yearStart), query);

  return (
    <section className={styles.station} aria-label={`Findings at ${station.name}`}>
      <header className={styles.stationHead}>
        <h2>
          <Link href={stationHref(slug, station.code, query)} prefetch={false}>
            {station.name}
          </Link>{' '}
          <small>{station.code}</small>
        </h2>
        <p>{count(group.count, 'finding')}</p>
        {several.map((some) => (
          <button
            key={some[0].kind}
            type="button"
            className={ui.button}
            onClick={() => onAnswer({ kind: 'accept', stationName: station.name, findings: some })}
          >
            Accept all {some.length}: {KIND_WORDS[some[0].kind].toLowerCase()}
          </button>
        ))}
      </header>
      {problem && <ErrorNote>{problem}</ErrorNote>}
      {!value && !problem && <Loading>Reading its findings…</Loading>}
      <ul className={styles.findings}>
        {findings.slice(0, upTo).map((finding) => (
          <li
            key={finding.id}
            ref={finding.id === led ? bring : undefined}
            className={styles.finding}
            data-state={finding.state}
            aria-current={finding.id === led ? true : undefined}
          >
            <FindingSketch slug={slug} finding={finding} version={version} />
            <div className={styles.words}>
              <p>
                <strong>{KIND_WORDS[finding.kind]}</strong>{' '}
                <span className={styles.state} data-state={finding.state}>
                  {STATE_WORDS[finding.state]}
                </span>
              </p>
              <p>
                <Link href={toYear(finding)} prefetch={false}>
                  {finding.first === finding.last ? finding.first : `${finding.first} to ${finding.last}`}
                </Link>
                {finding.days > 0 && `, ${count(finding.days, 'day')}`}
              </p>
              <p className={styles.figures}>{figuresOf(finding, units)}</p>
            </div>
            <div className={styles.actions}>
              {answersTo(finding).map((kind) => (
                <button
                  key={kind}
                  type="button"
                  className={ui.button}
                  aria-label={`${MARK_WORDS[kind].verb} ${KIND_WORDS[finding.kind].toLowerCase()} of ${finding.first}`}
                  onClick={() => onAnswer({ kind, stationName: station.name, findings: [finding] })}
                >
                  {MARK_WORDS[kind].verb}…
                </button>
              ))}
            </div>
          </li>
        ))}
      </ul>
      {upTo < findings.length && (
        <button type="button" className={ui.button} onClick={() => setShown(upTo + PAGE)}>
          Show {Math.min(PAGE, findings.length - upTo)} more of {findings.length}
        </button>
      )}
      <StationMarks slug={slug} station={station} version={version} onChanged={onChanged} />
    </section>
  );
}

/** A step in the mean speaks against no one day: there is nothing to reject at it. */
const answersTo = ({ kind }: FindingRow) => MARK_KINDS.filter((answer) => kind !== 'step' || answer !== 'reject');

/** All marks on a station's record, asked for when they are looked at. */
function StationMarks({
  slug,
  station,
  version,
  onChanged,
}: Pick<Props, 'slug' | 'version' | 'onChanged'> & { station: Group['station'] }) {
  const [open, setOpen] = useState(false);
  const { value, problem } = useAnswer<{ marks: MarkView[] }>(open ? marksAddress(slug, station.code) : null, version);
  return (
    <details className={styles.marks} onToggle={(event) => setOpen(event.currentTarget.open)}>
      <summary>Marks on this record</summary>
      {problem && <p>{problem}</p>}
      {value && value.marks.length === 0 && <p>None.</p>}
      {value && <MarkList slug={slug} marks={value.marks} onChanged={onChanged} />}
    </details>
  );
}
