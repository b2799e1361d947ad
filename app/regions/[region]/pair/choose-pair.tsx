'use client';
import { usePathname, useRouter, useSearchParams } from 'next/navigation';
import { useId, useState, useTransition } from 'react';
import { writeCodes } from '@/app/components/codes-in-address';
import { count, MISSING, signed } from '@/app/components/format';
import { ScrollFrame } from '@/app/components/scroll-frame';
import ui from '@/app/components/ui.module.css';
import type { ReferenceCandidate } from '@/lib/region/pair-types';
import styles from './choose-pair.module.css';

export interface StationOption {
  code: string;
  name: string;
  influence: string;
}

interface Props {
  stations: readonly StationOption[];
  station: string | null;
  candidates: readonly ReferenceCandidate[];
  references: readonly string[];
  ownChoice: boolean;
}

/** Rows shown at once; the frame scrolls, and any other station can be added by name. */
const SHOWN = 12;

/** Which station, and which references. Every choice goes into the address at once. */
export function ChoosePair({ stations, station, candidates, references, ownChoice }: Props) {
  const router = useRouter();
  const path = usePathname();
  const query = useSearchParams();
  const [pending, startTransition] = useTransition();
  const [ticked, setTicked] = useState<{ of: readonly string[]; codes: readonly string[] }>();
  // what was ticked holds until the server has answered
  const chosen = ticked?.of === references ? ticked.codes : references;
  const [stationId, otherId, listId] = [useId(), useId(), useId()];

  const go = (changes: Record<string, string | null>) => {
    const next = new URLSearchParams(query);
    for (const [name, value] of Object.entries(changes)) value === null ? next.delete(name) : next.set(name, value);
    const text = next.toString().replaceAll('%2C', ',');
    startTransition(() => router.push(text ? `${path}?${text}` : path, { scroll: false }));
  };
  const choose = (codes: readonly string[]) => {
    setTicked({ of: references, codes });
    go({ with: writeCodes(codes) });
  };
  const tick = (code: string, on: boolean) => choose(on ? [...chosen, code] : chosen.filter((other) => other !== code));

  const offered = new Map(candidates.map((candidate) => [candidate.code, candidate]));
  const others = chosen.filter((code) => !offered.has(code));
  const nameOf = (code: string) => stations.find((each) => each.code === code)?.name || code;
  return (
    <div className={styles.choose} aria-busy={pending}>
      <div className={ui.label}>
        <label htmlFor={stationId}>Station</label>
        <select
          id={stationId}
          className={ui.select}
          value={station ?? ''}
          onChange={(event) => go({ station: event.target.value || null, with: null, from: null, quantity: null })}
        >
          <option value="">Choose a station…</option>
          {stations.map(({ code, name }) => (
            <option key={code} value={code}>
              {name} ({code})
            </option>
          ))}
        </select>
      </div>
      {station !== null && (
        <fieldset className={styles.references}>
          <legend>References</legend>
          <p className={ui.hint} id={listId}>
            {ownChoice && chosen.length > 0
              ? `Chosen by the program: the natural ${chosen.length === 1 ? 'station' : 'stations'} nearby that go most with it. `
              : `${count(chosen.length, 'station')} chosen; several count as their mean. `}
            Natural stations nearby, those first whose yearly figures rise and fall most with this one’s.
          </p>
          <ScrollFrame className={styles.list} label="Stations that may serve as reference">
            <table aria-describedby={listId}>
              <thead>
                <tr>
                  <th scope="col">Station</th>
                  <th scope="col">Rank correlation</th>
                  <th scope="col">Common years</th>
                  <th scope="col">Distance</th>
                </tr>
              </thead>
              <tbody>
                {others.map((code) => (
                  <tr key={code}>
                    <th scope="row">
                      <Tick code={code} name={nameOf(code)} on onTick={tick} />
                    </th>
                    <td colSpan={3} className={styles.words}>
                      {stations.find((each) => each.code === code)?.influence ?? 'not known'}, added by name
                    </td>
                  </tr>
                ))}
                {candidates.map(({ code, name, correlation, commonYears, km }) => (
                  <tr key={code}>
                    <th scope="row">
                      <Tick code={code} name={name || code} on={chosen.includes(code)} onTick={tick} />
                    </th>
                    <td>{signed(correlation, 2)}</td>
                    <td>{commonYears}</td>
                    <td>{km === null ? MISSING : `${Math.round(km)} km`}</td>
                  </tr>
                ))}
              </tbody>
            </table>
            {candidates.length === 0 && (
              <p className={styles.none}>
                No natural station shares ten usable years with this one. Add a station by name.
              </p>
            )}
          </ScrollFrame>
          {candidates.length > SHOWN && (
            <p className={ui.hint}>{count(candidates.length, 'station')}: the list scrolls.</p>
          )}
          <div className={ui.label}>
            <label htmlFor={otherId}>Another station</label>
            <select id={otherId} className={ui.select} value="" onChange={(event) => tick(event.target.value, true)}>
              <option value="">Add by name…</option>
              {stations
                .filter(({ code }) => code !== station && !chosen.includes(code))
                .map(({ code, name, influence }) => (
                  <option key={code} value={code}>
                    {name} ({code}), {influence}
                  </option>
                ))}
            </select>
          </div>
        </fieldset>
      )}
    </div>
  );
}

interface TickProps {
  code: string;
  name: string;
  on: boolean;
  onTick(code: string, on: boolean): void;
}

function Tick({ code, name, on, onTick }: TickProps) {
  return (
    <label className={ui.check}>
      <input type="checkbox" checked={on} onChange={(event) => onTick(code, event.target.checked)} />
      {name}
    </label>
  );
}
