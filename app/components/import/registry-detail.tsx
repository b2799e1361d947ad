import type { Correction } from '@/lib/intake/types';
import type { FilePreview, LayerPreview } from '@/lib/jobs/upload-types';
import { AREA_UNITS } from '@/lib/series/area-units';
import { count, fixed, significant } from '../format.ts';
import { ScrollFrame } from '../scroll-frame.tsx';
import ui from '../ui.module.css';
import type { ChoicesEdit } from './choices-edit.ts';
import styles from './mapping.module.css';
import { ProblemNote } from './problem-note.tsx';
import { CORRECTION_WORDS } from './words.ts';

/** A station list as understood: its first stations, and corrections of the coordinates where these cannot be. */
export function RegistryDetail({ preview, change }: { preview: FilePreview; change(edit: ChoicesEdit): void }) {
  const { registry, problems, choices, file } = preview;
  const chosen = choices.corrections ?? [];
  const setTo = (correction: Correction, on: boolean) => {
    const next = on ? [...chosen, correction] : chosen.filter((one) => one !== correction);
    change({ own: true, corrections: next.length > 0 ? next : undefined });
  };
  return (
    <>
      {problems.map((problem) => (
        <ProblemNote
          key={problem.message}
          problem={problem}
          answeredHere={problem.problem.needs === 'correction' || problem.problem.needs === 'area'}
        >
          {problem.problem.needs === 'area' && (
            <p className={styles.actions}>
              {AREA_UNITS.map((areaUnit) => (
                <button
                  key={areaUnit}
                  type="button"
                  className={ui.button}
                  onClick={() => change({ own: true, areaUnit })}
                >
                  Areas are in {areaUnit}
                </button>
              ))}
            </p>
          )}
          {problem.problem.needs === 'correction' && (
            <p className={styles.actions}>
              {registry?.offered.map((correction) => (
                <button key={correction} type="button" className={ui.button} onClick={() => setTo(correction, true)}>
                  {CORRECTION_WORDS[correction]}
                </button>
              ))}
            </p>
          )}
        </ProblemNote>
      ))}
      {choices.areaUnit && (
        <label className={ui.check}>
          <input type="checkbox" checked onChange={() => change({ own: true, areaUnit: undefined })} />
          Areas are in {choices.areaUnit}
        </label>
      )}
      {chosen.map((correction) => (
        <label key={correction} className={ui.check}>
          <input type="checkbox" checked onChange={() => setTo(correction, false)} />
          {CORRECTION_WORDS[correction]}
        </label>
      ))}
      {registry?.warnings.map((warning) => (
        <p key={warning} className={styles.note}>
          {warning}
        </p>
      ))}
      {registry && registry.stations.length > 0 && (
        <ScrollFrame className={styles.rows} label={`First stations of ${file}`}>
          <table className={styles.firstRows}>
            <caption>
              {registry.total > registry.stations.length
                ? `The first ${registry.stations.length} of ${count(registry.total, 'station')}, as understood`
                : `${count(registry.total, 'station')}, as understood`}
            </caption>
            <thead>
              <tr>
                <th scope="col">Code</th>
                <th scope="col">Name</th>
                <th scope="col">River</th>
                <th scope="col" className={styles.number}>
                  Latitude
                </th>
                <th scope="col" className={styles.number}>
                  Longitude
                </th>
                <th scope="col" className={styles.number}>
                  Area, km²
                </th>
                <th scope="col">Influence</th>
              </tr>
            </thead>
            <tbody>
              {registry.stations.map((station) => (
                <tr key={station.code}>
                  <th scope="row">{station.code}</th>
                  <td>{station.name}</td>
                  <td>{station.river}</td>
                  <td className={styles.number}>{fixed(station.latitude, 4)}</td>
                  <td className={styles.number}>{fixed(station.longitude, 4)}</td>
                  <td className={styles.number}>{significant(station.areaKm2, 5)}</td>
                  <td>{station.influence}</td>
                </tr>
              ))}
            </tbody>
          </table>
        </ScrollFrame>
      )}
    </>
  );
}

/** A map layer in numbers. */
export function LayerDetail({ layer }: { layer: LayerPreview }) {
  const [west, south, east, north] = layer.bounds;
  return (
    <>
      <p>
        {count(layer.features, layer.kind === 'other' ? 'shape' : layer.kind)} between {fixed(west, 3)} and{' '}
        {fixed(east, 3)} degrees east, {fixed(south, 3)} and {fixed(north, 3)} degrees north; it will be called “
        {layer.name}”.
      </p>
      {layer.warnings.map((warning) => (
        <p key={warning} className={styles.note}>
          {warning}
        </p>
      ))}
    </>
  );
}
