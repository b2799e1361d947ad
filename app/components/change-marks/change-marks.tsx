import styles from './change-marks.module.css';
import { changeText, type PlacedChange, TAB } from './marked-changes.ts';

interface Props {
  changes: readonly PlacedChange[];
  /** where the tabs begin, and where the plot ends, pixels */
  top: number;
  bottom: number;
}

/** Dated changes on a time axis of an SVG figure: a dashed line down the plot from a tab with the change's letter. */
export function ChangeMarks({ changes, top, bottom }: Props) {
  return (
    <g className={styles.marks}>
      {changes.map((change) => {
        const y = top + change.row * TAB.height;
        return (
          <g key={change.letter} data-change={change.letter}>
            <title>{`${change.letter}: ${changeText(change)}`}</title>
            <line x1={change.x} x2={change.x} y1={y} y2={bottom} />
            <rect x={change.x} y={y} width={TAB.width - 2} height={TAB.height - 2} />
            <text x={change.x + TAB.width / 2 - 1} y={y + TAB.height - 4} textAnchor="middle">
              {change.letter}
            </text>
          </g>
        );
      })}
    </g>
  );
}

/** What the letters on the figures stand for. */
export function ChangeLegend({
  changes,
}: {
  changes: readonly { letter: string; date: string; kind: string; note: string }[];
}) {
  if (changes.length === 0) return null;
  return (
    <ul className={styles.legend} aria-label="Dated changes">
      {changes.map(({ letter, date, kind, note }) => (
        <li key={letter}>
          <span className={styles.letter}>{letter}</span> <time dateTime={date}>{date}</time> <strong>{kind}</strong>
          {note && `: ${note}`}
        </li>
      ))}
    </ul>
  );
}
