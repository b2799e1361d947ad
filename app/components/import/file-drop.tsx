'use client';
import { type DragEvent, useId, useRef, useState } from 'react';
import ui from '../ui.module.css';
import styles from './import.module.css';

interface Props {
  onFiles(files: File[]): void;
  disabled?: boolean;
}

/** Where files are dropped, or chosen by the button. */
export function FileDrop({ onFiles, disabled = false }: Props) {
  const [over, setOver] = useState(false);
  const input = useRef<HTMLInputElement>(null);
  const hintId = useId();
  const drop = (event: DragEvent) => {
    event.preventDefault();
    setOver(false);
    if (!disabled && event.dataTransfer.files.length > 0) onFiles([...event.dataTransfer.files]);
  };
  return (
    <section
      className={styles.drop}
      data-over={over || undefined}
      aria-label="Files to import"
      onDragOver={(event) => {
        event.preventDefault();
        setOver(true);
      }}
      onDragLeave={() => setOver(false)}
      onDrop={drop}
    >
      <p className={styles.dropTitle}>Drop files here</p>
      <button
        type="button"
        className={ui.button}
        disabled={disabled}
        aria-describedby={hintId}
        onClick={() => input.current?.click()}
      >
        Choose files…
      </button>
      <input
        ref={input}
        type="file"
        multiple
        hidden
        onChange={(event) => {
          onFiles([...(event.target.files ?? [])]);
          // the same file may be chosen again after it was mended
          event.target.value = '';
        }}
      />
      <p id={hintId} className={styles.dropHint}>
        Station lists, daily flows and map layers (GeoJSON), several at once. What each file is, its layout and its unit
        are recognised by its content; where something cannot be told, it is asked.
      </p>
    </section>
  );
}
