import { fixed } from '../format.ts';
import ui from '../ui.module.css';
import styles from './import.module.css';

interface Props {
  files: readonly File[];
  onRemove(file: File): void;
}

export function ChosenFiles({ files, onRemove }: Props) {
  return (
    <ul className={styles.files} aria-label="Chosen files">
      {files.map((file) => (
        <li key={file.name}>
          <span className={styles.fileName}>{file.name}</span>
          <span className={styles.fileSize}>{sizeText(file.size)}</span>
          <button
            type="button"
            className={ui.plain}
            onClick={() => onRemove(file)}
            aria-label={`Leave out ${file.name}`}
          >
            leave out
          </button>
        </li>
      ))}
    </ul>
  );
}

/** Example: 1_234_567 → "1.2 MB" */
export function sizeText(bytes: number): string {
  if (bytes < 1000) return `${fixed(bytes)} bytes`;
  const units = ['kB', 'MB', 'GB', 'TB'];
  let size = bytes / 1000;
  let unit = 0;
  while (size >= 999.5 && unit < units.length - 1) {
    size /= 1000;
    unit++;
  }
  return `${fixed(size, size < 10 ? 1 : 0)} ${units[unit]}`;
}
