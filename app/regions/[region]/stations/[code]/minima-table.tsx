import { fixed, flowIn, MISSING, significant, UNIT_WORDS, type Units } from '@/app/components/format';
import { ScrollFrame } from '@/app/components/scroll-frame';
import { type IndexScale, valueText } from './index-scale.ts';
import type { MinimaPoint } from './minima-points';
import styles from './station-screen.module.css';

/** Every year's minimum in figures, beside what is compared where that is another figure, with the reason where it is not used. Folded away until wanted. */
export function MinimaTable({
  points,
  units,
  days,
  scale,
}: {
  points: readonly MinimaPoint[];
  units: Units;
  days: number;
  scale: IndexScale;
}) {
  return (
    <details className={styles.minimaTable}>
      <summary>{scale.index === 'minimum' ? 'The minima' : 'The years'} as a table</summary>
      <ScrollFrame className={styles.scroll} label="Annual minima as a table">
        <table>
          <thead>
            <tr>
              <th scope="col">Year</th>
              {scale.index !== 'minimum' && <th scope="col">{scale.axisName}</th>}
              <th scope="col">
                {days}-day minimum, {UNIT_WORDS[units].flow}
              </th>
              <th scope="col">To the day</th>
              <th scope="col">Missing days</th>
              <th scope="col">Flagged days</th>
              <th scope="col">Used</th>
            </tr>
          </thead>
          <tbody>
            {points.map((point) => (
              <tr key={point.year} data-unused={!point.usable || undefined}>
                <th scope="row">{point.label}</th>
                {scale.index !== 'minimum' && <td>{point.value === null ? MISSING : valueText(point.value, scale)}</td>}
                <td>
                  {!point.usable && point.minimum !== null && 'at most '}
                  {significant(flowIn(point.minimum, units))}
                </td>
                <td>{point.date ?? '–'}</td>
                <td>{fixed(point.missingDays)}</td>
                <td>{fixed(point.flaggedDays)}</td>
                <td className={styles.words}>
                  {point.used ? 'yes' : point.usable ? 'usable, not among the years compared' : `no: ${point.reason}`}
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      </ScrollFrame>
    </details>
  );
}
