import { ScrollFrame } from '../scroll-frame.tsx';
import styles from './import.module.css';

interface Props {
  name: string;
  header: readonly string[] | null;
  rows: readonly (readonly string[])[];
}

/** Rows of a file that are shown to help an answer. */
const ROWS = 6;

/** The first rows of a file as they were split into fields. Fields are known by their place alone. */
export function FilePreview({ name, header, rows }: Props) {
  const body = header && rows[0]?.join('\t') === header.join('\t') ? rows.slice(1) : rows;
  return (
    <ScrollFrame className={styles.scroll} label={`First rows of ${name}`}>
      <table className={styles.preview}>
        {header && (
          <thead>
            <tr>
              {numbered(header).map(({ item, number }) => (
                <th key={number} scope="col">
                  {item}
                </th>
              ))}
            </tr>
          </thead>
        )}
        <tbody>
          {numbered(body.slice(0, ROWS)).map(({ item: row, number: line }) => (
            <tr key={line}>
              {numbered(row).map(({ item, number }) => (
                <td key={number}>{item}</td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </ScrollFrame>
  );
}

function numbered<Item>(items: readonly Item[]): { item: Item; number: number }[] {
  return items.map((item, number) => ({ item, number }));
}
