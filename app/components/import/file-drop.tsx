'use client';
import { type DragEvent, useId, useRef, useState } from 'react';
import ui from '../ui.module.css';
import { filesIn } from './dropped-files.ts';
import styles from './import.module.css';

interface Props {
  onFiles(files: File[]): void;
}

/** Where files and folders are dropped, or chosen by the buttons. */
export function FileDrop({ onFiles }: Props) {
  const [over, setOver] = useState(false);
  const hintId = useId();
  const drop = (event: DragEvent) => {
    event.preventDefault();
    setOver(false);
    // The list of what was dropped is gone once this handler is left: it is walked from here.
    void filesIn(event.dataTransfer).then((files) => files.length > 0 && onFiles(files));
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
      <p className={styles.pickers}>
        <FilePicker onFiles={onFiles} words="Choose files…" describedBy={hintId} />
        <FilePicker onFiles={onFiles} words="Choose a folder…" describedBy={hintId} folder />
      </p>
      <p id={hintId} className={styles.dropHint}>
        Station lists, daily values and map layers, folders and archives (.zip, .gz) of them. What each file is, its
        layout and its unit are recognised by its content and shown to you before anything is imported.
      </p>
    </section>
  );
}

interface PickerProps {
  onFiles(files: File[]): void;
  words: string;
  describedBy?: string;
  folder?: boolean;
}

/** A button that opens the browser's choice of files. */
export function FilePicker({ onFiles, words, describedBy, folder = false }: PickerProps) {
  const input = useRef<HTMLInputElement>(null);
  return (
    <>
      <button type="button" className={ui.button} aria-describedby={describedBy} onClick={() => input.current?.click()}>
        {words}
      </button>
      <input
        ref={input}
        type="file"
        multiple
        hidden
        data-folder={folder || undefined}
        {...(folder ? { webkitdirectory: '' } : {})}
        onChange={(event) => {
          const files = [...(event.target.files ?? [])].filter(({ name }) => !name.startsWith('.'));
          if (files.length > 0) onFiles(files);
          // the same file may be chosen again after it was mended
          event.target.value = '';
        }}
      />
    </>
  );
}
