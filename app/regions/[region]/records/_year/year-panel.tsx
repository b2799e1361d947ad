'use client';
import Link from 'next/link';
import { useSearchParams } from 'next/navigation';
import { useQueryState } from 'nuqs';
import { useEffect, useMemo, useRef, useState } from 'react';
import { markedChanges } from '@/app/components/change-marks/marked-changes';
import { flow, flowIn } from '@/app/components/format';
import { findingHref, stationHref } from '@/app/components/links';
import { ErrorNote, Loading } from '@/app/components/notes';
import { Segmented } from '@/app/components/segmented';
import ui from '@/app/components/ui.module.css';
import { useAnswer } from '@/app/components/use-answer';
import type { ResolvedBasis } from '@/lib/basis';
import { isoDate, parseIsoDate } from '@/lib/calendar/day';
import { lowFlowYearLabel } from '@/lib/calendar/low-flow-year';
import { seasonSpan } from '@/lib/calendar/season';
import type { FindingRow, MarkView, StationYears } from '@/lib/jobs/records-types';
import type { StationChange } from '@/lib/series/station-history';
import { cellWords, type YearCell } from '../_chart/year-cell.ts';
import { figuresOf, KIND_WORDS, STATE_WORDS } from '../_findings/finding-words.ts';
import { MarkForm } from '../_marks/mark-form.tsx';
import { MarkList } from '../_marks/mark-list.tsx';
import { marksAddress } from '../_marks/marks-address.ts';
import { recordsState } from '../records-state.ts';
import { DayFigure } from './day-figure.tsx';
import { type DaysAnswer, dayColumns } from './days-answer.ts';
import { DaysTable } from './days-table.tsx';
import { inYear, lanesOf } from './year-lanes.ts';
import styles from './year-panel.module.css';

interface Props {
  slug: string;
  station: StationYears;
  year: number;
  cell: YearCell | null;
  basis: ResolvedBasis;
  version: number;
  onYear(year: number): void;
  onClose(): void;
  onChanged(): void;
}

/** `year` is the one that they were chosen in: in another year nothing is chosen yet. */
const NO_DATES = { year: 0, first: '', last: '' };

/** One year of one station, day by day: its flows, their flags, what the checks found, what people said, and a form to
 *  say more. */
export function YearPanel({ slug, station, year, cell, basis, version, onYear, onClose, onChanged }: Props) {
  const query = useSearchParams();
  const [kind, setKind] = useQueryState('y', recordsState.y);
  const [dates, setDates] = useState(NO_DATES);
  const panel = useRef<HTMLElement>(null);
  const heading = useRef<HTMLHeadingElement>(null);
  const { first, last } = seasonSpan(year, basis.yearStart, null);
  const season = basis.season ? seasonSpan(year, basis.yearStart, basis.season) : null;
  const region = `/api/regions/${encodeURIComponent(slug)}`;
  const days = `${region}/stations/${encodeURIComponent(station.code)}/days?first=${isoDate(first)}&last=${isoDate(last)}`;
  const answer = useAnswer<DaysAnswer>(days, version);
  const findings = useAnswer<{ findings: FindingRow[] }>(
    `${region}/findings?station=${encodeURIComponent(station.code)}`,
    version,
  );
  const marks = useAnswer<{ marks: MarkView[] }>(marksAddress(slug, station.code), version);
  const facts = useAnswer<{ changes: StationChange[] }>(`${region}/stations/${encodeURIComponent(station.code)}/facts`);
  const changes = useMemo(() => markedChanges(facts.value?.changes ?? []), [facts.value]);
  const changed = changes.filter(({ day }) => day >= first && day <= last);
  const label = lowFlowYearLabel(year, basis.yearStart);

  const columns = useMemo(
    () => dayColumns(answer.value, first, last, flowIn(1, basis.units) ?? 1),
    [answer.value, first, last, basis.units],
  );
  const found = inYear(findings.value?.findings ?? [], first, last);
  const said = inYear(marks.value?.marks ?? [], first, last);
  const lanes = useMemo(
    () => lanesOf(columns, findings.value?.findings ?? [], marks.value?.marks ?? []),
    [columns, findings.value, marks.value],
  );
  const flowText = (value: number) => flow(value / (flowIn(1, basis.units) ?? 1), basis.units);

  // a year that was just opened is read from its heading on
  useEffect(() => {
    heading.current?.focus({ preventScroll: true });
    panel.current?.scrollIntoView({ block: 'nearest' });
    setDates({ ...NO_DATES, year });
  }, [year]);

  // Escape closes the panel from wherever in it the focus is
  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      // the figure takes the first one for its own selection
      if (event.key !== 'Escape' || event.defaultPrevented) return;
      if (event.target instanceof Node && panel.current?.contains(event.target)) onClose();
    };
    document.addEventListener('keydown', onKey);
    return () => document.removeEventListener('keydown', onKey);
  }, [onClose]);

  const choose = (from: string, to: string) => setDates({ year, first: from, last: to });
  const selection = useMemo(() => {
    const [from, to] = [parseIsoDate(dates.first), parseIsoDate(dates.last)];
    return from <= to ? ([from, to] as const) : null;
  }, [dates]);

  return (
    <section ref={panel} className={styles.panel} aria-labelledby="year-title">
      <header className={styles.head}>
        <div>
          <h2 id="year-title" ref={heading} tabIndex={-1}>
            {station.name}, {label}
          </h2>
          <p className={styles.counts}>
            {cell ? cellWords(cell, basis.yearStart) : 'This year lies outside the record.'}
            {season && ' · the basis’s season is counted; days outside it are shaded'}
          </p>
        </div>
        <div className={styles.ways}>
          <button type="button" className={ui.button} onClick={() => onYear(year - 1)} aria-label="The year before">
            ←
          </button>
          <button type="button" className={ui.button} onClick={() => onYear(year + 1)} aria-label="The year after">
            →
          </button>
          <Link className={ui.button} href={stationHref(slug, station.code, query)} prefetch={false}>
            Station
          </Link>
          <a className={ui.button} href={`${days}&format=csv`} download>
            Days CSV
          </a>
          <button type="button" className={ui.button} onClick={onClose}>
            Close
          </button>
        </div>
      </header>
      <Segmented
        label="Flow axis"
        value={kind}
        options={[
          { value: 'log', label: 'logarithmic', title: 'Zero and negative flows lie on the floor' },
          { value: 'linear', label: 'linear' },
        ]}
        onChange={(value) => void setKind(value)}
      />
      {answer.problem ? (
        <ErrorNote title="The days could not be read">{answer.problem}</ErrorNote>
      ) : answer.value ? (
        <DayFigure
          label={`Daily flows of ${station.name} in ${label}. Arrow keys move from day to day, with Shift they choose a stretch. The table below holds the same.`}
          columns={columns}
          lanes={lanes}
          changes={changes}
          season={season && [season.first, season.last]}
          kind={kind}
          flowText={flowText}
          selection={selection}
          onSelect={(span) => (span ? choose(isoDate(span[0]), isoDate(span[1])) : choose('', ''))}
        />
      ) : (
        <Loading>Reading the days…</Loading>
      )}
      {changed.length > 0 && (
        <ul className={styles.changes} aria-label="Changes at the station in this year">
          {changed.map(({ letter, date, kind, note }) => (
            <li key={letter}>
              <strong>{letter}</strong> {date}: {kind}
              {note && ` – ${note}`}
            </li>
          ))}
        </ul>
      )}
      <div className={styles.below}>
        <MarkForm
          slug={slug}
          code={station.code}
          first={dates.first}
          last={dates.last}
          onDates={choose}
          onChanged={onChanged}
        />
        <div className={styles.lists}>
          <h3>What the checks found</h3>
          {findings.problem && <ErrorNote>{findings.problem}</ErrorNote>}
          {findings.value && found.length === 0 && <p className={ui.hint}>Nothing in this year.</p>}
          <ul className={styles.found}>
            {found.map((finding) => (
              <li key={finding.id}>
                <span>
                  <Link href={findingHref(slug, finding, query)} prefetch={false}>
                    {KIND_WORDS[finding.kind]}
                  </Link>
                  , {finding.first === finding.last ? finding.first : `${finding.first} to ${finding.last}`} (
                  {STATE_WORDS[finding.state]}): {figuresOf(finding, basis.units)}
                </span>
                <button
                  type="button"
                  className={ui.plain}
                  onClick={() => choose(finding.first, finding.last)}
                  aria-label={`Choose its days: ${KIND_WORDS[finding.kind]}, ${finding.first} to ${finding.last}`}
                >
                  Choose its days
                </button>
              </li>
            ))}
          </ul>
          <h3>Marks</h3>
          {marks.problem && <ErrorNote>{marks.problem}</ErrorNote>}
          {marks.value && said.length === 0 && <p className={ui.hint}>Nobody has marked a day of this year.</p>}
          <MarkList slug={slug} marks={said} onChanged={onChanged} />
        </div>
      </div>
      <DaysTable columns={columns} label={label} flowText={flowText} />
    </section>
  );
}
