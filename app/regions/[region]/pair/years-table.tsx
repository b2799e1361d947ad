import { ScrollFrame } from '@/app/components/scroll-frame';
import styles from './pair-screen.module.css';

interface Props {
  summary: string;
  label: string;
  heads: readonly string[];
  /** the first cell names the row */
  rows: readonly (readonly string[])[];
}

/** The figures behind a drawing, folded away until wanted. */
export function YearsTable({ summary, label, heads, rows }: Props) {
  return (
    <details className={styles.table}>
      <summary>{summary}</summary>
      <ScrollFrame className={styles.tall} label={label}>
        <table>
          <thead>
            <tr>
              {heads.map((head) => (
                <th key={head} scope="col">
                  {head}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {rows.map(([first, ...rest]) => (
              <tr key={first}>
                <th scope="row">{first}</th>
                {rest.map((cell, i) => (
                  <td key={heads[i + 1]}>{cell}</td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </ScrollFrame>
    </details>
  );
}
