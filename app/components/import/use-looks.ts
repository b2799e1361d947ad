'use client';
import { type RefObject, useEffect, useRef, useState } from 'react';
import { type FilePreview, inShort, type UploadedFile } from '@/lib/jobs/upload-types';
import { type ChoicesEdit, edited, sameChoices } from './choices-edit.ts';
import { lookAtFile, lookAtFiles } from './upload-client.ts';

/** Milliseconds without another change after which a file is looked at anew: typing asks once. */
const SETTLE_MS = 150;
/** Files looked at in one request. */
const BATCH = 40;

/** A file as it is seen. */
export interface FileSight extends FilePreview {
  /** what is shown of it is from before the last change, which could not be read */
  stale: boolean;
}

interface Options {
  /** the upload whose files are looked at; null while there is none */
  id: string | null;
  files: readonly UploadedFile[];
  setFiles: (change: (now: readonly UploadedFile[]) => readonly UploadedFile[]) => void;
  /** the file that is shown whole */
  selected: string | null;
  /** called when a station list was looked at: what flows may name has changed */
  onRegistry(): void;
  onError(words: string): void;
}

/** Keeps sight of what an upload's files look like under the choices made for them: of the selected one whole and at
 *  once, of the others in short and in turn. */
export function useLooks({ id, files, setFiles, selected, onRegistry, onError }: Options) {
  const [preview, setPreview] = useState<FileSight | null>(null);
  /** the selected file's choices have changed since its preview was asked for */
  const [asked, setAsked] = useState(0);
  const [busy, setBusy] = useState(false);
  const latest = useLatest({ files, setFiles, onRegistry, onError });

  useEffect(() => {
    const file = latest.current.files.find((one) => one.file === selected);
    if (id === null || !file) {
      setPreview(null);
      return;
    }
    const gone = new AbortController();
    const look = async () => {
      try {
        const next = await lookAtFile(id, file.file, file.choices, gone.signal);
        setPreview((before) => keepingSight(next, before));
        latest.current.setFiles((now) => replaced(now, [inShort(next)]));
        if (next.kind === 'registry') latest.current.onRegistry();
      } catch (error) {
        if (!gone.signal.aborted) latest.current.onError(wordsOf(error));
      } finally {
        if (!gone.signal.aborted) setBusy(false);
      }
    };
    setBusy(true);
    const timer = setTimeout(() => void look(), asked > 0 ? SETTLE_MS : 0);
    return () => {
      clearTimeout(timer);
      gone.abort();
    };
  }, [id, selected, asked, latest]);

  // The selected file, too, is to be looked at anew when the server has forgotten its look.
  const unseen = files.some(({ state, file }) => state === 'unseen' && file === selected);
  useEffect(() => {
    if (unseen) setAsked((count) => count + 1);
  }, [unseen]);

  const waiting = files.filter(({ state, file }) => state === 'unseen' && file !== selected).length;
  /** counts the requests for the others that have come to an end */
  const [ended, setEnded] = useState(0);
  const looking = useRef(false);
  useEffect(() => {
    if (id === null || busy || waiting === 0 || looking.current) return;
    const batch = latest.current.files.filter(({ state, file }) => state === 'unseen' && file !== selected);
    const choices = Object.fromEntries(batch.slice(0, BATCH).map((file) => [file.file, file.choices]));
    looking.current = true;
    lookAtFiles(id, choices)
      .then((next) => {
        latest.current.setFiles((now) => replaced(now, next));
        if (next.some(({ kind }) => kind === 'registry')) latest.current.onRegistry();
        looking.current = false;
        setEnded(ended + 1);
      })
      .catch((error: unknown) => {
        looking.current = false;
        latest.current.onError(wordsOf(error));
      });
  }, [id, busy, waiting, selected, ended, latest]);

  return {
    preview: preview?.file === selected ? preview : null,
    busy,
    waiting,
    /** changes the choices of the selected file, and of others that take the same */
    change(change: ChoicesEdit, alike: readonly string[]) {
      setFiles((now) =>
        now.map((one) => {
          if (one.file === selected) return { ...one, choices: edited(one.choices, change) };
          if (change.own || !alike.includes(one.file)) return one;
          return { ...one, choices: edited(one.choices, change), state: 'unseen' as const };
        }),
      );
      setAsked((count) => count + 1);
    },
  };
}

export const wordsOf = (error: unknown): string => (error instanceof Error ? error.message : String(error));

/** A choice that cannot be read leaves the last good sight of the file on the screen, with what is wrong about it. */
function keepingSight(next: FilePreview, before: FileSight | null): FileSight {
  const earlier = before?.file === next.file && before.kind === next.kind ? before.inspection : null;
  return { ...next, inspection: next.inspection ?? earlier, stale: next.inspection === null && earlier !== null };
}

/** The files with fresh looks laid in. One whose choices were changed meanwhile is still to be looked at. */
function replaced(now: readonly UploadedFile[], fresh: readonly UploadedFile[]): UploadedFile[] {
  const byName = new Map(fresh.map((one) => [one.file, one]));
  return now.map((one) => {
    const look = byName.get(one.file);
    return look && sameChoices(look.choices, one.choices) ? look : one;
  });
}

function useLatest<Value>(value: Value): RefObject<Value> {
  const latest = useRef(value);
  latest.current = value;
  return latest;
}
