'use client';
import { AlertDialog } from '@base-ui/react/alert-dialog';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { count } from '@/app/components/format';
import { ErrorNote } from '@/app/components/notes';
import ui from '@/app/components/ui.module.css';
import type { ListedImport } from './import-history.tsx';
import styles from './import-page.module.css';

interface Props {
  slug: string;
  entry: ListedImport;
}

const EFFECTS: Record<string, string> = {
  flows:
    'Its values leave the records. Where another import gave values for the same days, those stand again. Stations that this import made, and that hold nothing else, go as well.',
  registry: 'Stations and facts go back to what stood before this list was taken in.',
  layer: 'The layer leaves the map.',
};

/** Takes an import back, after asking. The answer stays in the dialog when it could not be done. */
export function UndoImport({ slug, entry }: Props) {
  const { id, fileName, kind } = entry;
  const router = useRouter();
  const [open, setOpen] = useState(false);
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);
  const undo = async () => {
    setBusy(true);
    setProblem(null);
    const address = `/api/regions/${encodeURIComponent(slug)}/imports/${id}`;
    const response = await fetch(address, { method: 'DELETE' }).catch(() => null);
    setBusy(false);
    if (response?.ok) {
      setOpen(false);
      router.refresh();
      return;
    }
    const answer = (await response?.json().catch(() => null)) as { detail?: string } | null;
    setProblem(answer?.detail ?? 'The server could not be reached. Nothing was changed; try again.');
  };
  return (
    <AlertDialog.Root open={open} onOpenChange={setOpen}>
      <AlertDialog.Trigger className={ui.button} aria-label={`Undo the import of ${fileName}`}>
        Undo…
      </AlertDialog.Trigger>
      <AlertDialog.Portal>
        <AlertDialog.Backdrop className={styles.backdrop} />
        <AlertDialog.Popup className={styles.dialog}>
          <AlertDialog.Title render={<h2>Undo the import of {fileName}?</h2>} />
          <AlertDialog.Description>
            {[EFFECTS[kind] ?? 'What it brought goes.', ...lossWords(entry)].join(' ')}
          </AlertDialog.Description>
          {problem && <ErrorNote>{problem}</ErrorNote>}
          <div className={styles.dialogButtons}>
            <AlertDialog.Close className={ui.button} disabled={busy}>
              Keep it
            </AlertDialog.Close>
            <button type="button" className={ui.primary} disabled={busy} onClick={() => void undo()}>
              {busy ? 'Undoing…' : 'Undo the import'}
            </button>
          </div>
        </AlertDialog.Popup>
      </AlertDialog.Portal>
    </AlertDialog.Root>
  );
}

/** What goes and what comes back, in numbers, as far as the import counted them when it was taken. */
function lossWords({ revisions }: ListedImport): string[] {
  if (revisions === null) return [];
  const gained = revisions.extended + revisions.filled;
  return [
    gained > 0 ? `${count(gained, 'day')} had no value before it.` : '',
    revisions.revised > 0
      ? `${count(revisions.revised, 'value')} that it changed ${revisions.revised === 1 ? 'goes' : 'go'} back to what stood.`
      : '',
  ].filter(Boolean);
}
