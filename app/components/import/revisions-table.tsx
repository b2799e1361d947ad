import type { Revisions, StationRevisions } from '@/lib/store/revisions';
import { count, fixed, significant } from '../format.ts';
import { ScrollFrame } from '../scroll-frame.tsx';
import styles from './review.module.css';
import { unitText } from './unit-text.ts';

export const NO_REVISIONS: Revisions = {
  ...{ extended: 0, filled: 0, equal: 0, unlike: 0, unlikeProvisional: 0, revised: 0, stations: [] },
};

/** Counts over several files. */
export function sumOf(all: readonly Revisions[]): Revisions {
  const sum = (key: 'extended' | 'filled' | 'equal' | 'unlike' | 'unlikeProvisional' | 'revised') =>
    all.reduce((total, one) => total + one[key], 0);
  return {
    ...{ extended: sum('extended'), filled: sum('filled'), equal: sum('equal'), unlike: sum('unlike') },
    ...{ unlikeProvisional: sum('unlikeProvisional'), revised: sum('revised') },
    stations: all.flatMap(({ stations }) => stations),
  };
}

/** What each file does to the days that stand. */
export function RevisionsTable({ files }: { files: readonly { file: string; revisions: Revisions }[] }) {
  return (
    <ScrollFrame className={styles.scroll} label="Days that each file adds, fills and changes">
      <table className={styles.table}>
        <thead>
          <tr>
            <th scope="col">File</th>
            <th scope="col">Days added</th>
            <th scope="col">Gaps filled</th>
            <th scope="col">Equal</th>
            <th scope="col">Unlike</th>
            <th scope="col">of these provisional</th>
          </tr>
        </thead>
        <tbody>
          {files.map(({ file, revisions }) => (
            <tr key={file}>
              <th scope="row">{file}</th>
              <td>{fixed(revisions.extended)}</td>
              <td>{fixed(revisions.filled)}</td>
              <td>{fixed(revisions.equal)}</td>
              <td data-attention={revisions.unlike > 0 || undefined}>{fixed(revisions.unlike)}</td>
              <td>{fixed(revisions.unlikeProvisional)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </ScrollFrame>
  );
}

/** The stations whose values differ, with the largest change of each. */
export function StationRevisionsTable({ file, stations }: { file: string; stations: readonly StationRevisions[] }) {
  if (stations.length === 0) return null;
  return (
    <ScrollFrame className={styles.scroll} label={`Unlike values in ${file}`}>
      <table className={styles.table}>
        <caption>
          Unlike values in {file}, {count(stations.length, 'station')}, the largest change first
        </caption>
        <thead>
          <tr>
            <th scope="col">Station</th>
            <th scope="col">Unlike days</th>
            <th scope="col">First</th>
            <th scope="col">Last</th>
            <th scope="col">Largest change on</th>
            <th scope="col">stands</th>
            <th scope="col">new</th>
          </tr>
        </thead>
        <tbody>
          {stations.map(({ code, unlike, first, last, largest }) => (
            <tr key={code}>
              <th scope="row">{code}</th>
              <td>{fixed(unlike)}</td>
              <td>{first}</td>
              <td>{last}</td>
              <td>{largest.date}</td>
              <td>
                {significant(largest.standing, 4)} {unitText(largest.unit)}
              </td>
              <td>
                {significant(largest.other, 4)} {unitText(largest.unit)}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </ScrollFrame>
  );
}

/** Example: "365 days added, 12 gaps filled, 5 of 7 unlike days took the new value" */
export function revisionWords({ extended, filled, equal, unlike, revised }: Revisions): string {
  return [
    extended > 0 ? `${count(extended, 'day')} added` : '',
    filled > 0 ? `${count(filled, 'day')} of gaps filled` : '',
    equal > 0 ? `${fixed(equal)} equal` : '',
    unlike > 0 ? `${fixed(revised)} of ${count(unlike, 'unlike day')} took the new value` : '',
  ]
    .filter(Boolean)
    .join(', ');
}
