'use client';
import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { type FormEvent, useRef, useState } from 'react';
import { FormField } from '@/app/components/form-field';
import { ErrorNote } from '@/app/components/notes';
import {
  type RecipeDraft,
  readRecipe,
  recipeDraftOf,
  type StationChoice,
} from '@/app/components/station-form/recipe-draft';
import { RecipeFields } from '@/app/components/station-form/recipe-fields';
import { type SaveResult, sendStation } from '@/app/components/station-form/send-station';
import styles from '@/app/components/station-form/station-form.module.css';
import ui from '@/app/components/ui.module.css';
import type { DerivedRecipe } from '@/lib/series/station-history';
import { ChangesFields } from './changes-fields';
import { FactsFields } from './facts-fields';
import { FlowsFields } from './flows-fields';
import { draftOf, type EditableFacts, type Problems, readDraft, type StationDraft } from './station-draft.ts';

interface Props {
  slug: string;
  code: string;
  facts: EditableFacts;
  recipe: DerivedRecipe | null;
  /** names the facts as they were read: saving is refused when they are others by then */
  edition: string;
  stations: readonly StationChoice[];
  /** the station's page, and the region's */
  back: string;
  home: string;
}

/** Everything that a person may change of a station. Saved as a whole or not at all. */
export function StationForm({ slug, code, facts, recipe, edition, stations, back, home }: Props) {
  const router = useRouter();
  const form = useRef<HTMLFormElement>(null);
  const [draft, setDraft] = useState<StationDraft>(() => draftOf(facts));
  const [recipeDraft, setRecipeDraft] = useState<RecipeDraft | null>(() => recipe && recipeDraftOf(recipe, stations));
  const [problems, setProblems] = useState<Problems>({});
  const [failed, setFailed] = useState<Extract<SaveResult, { ok: false }> | null>(null);
  const [busy, setBusy] = useState(false);
  const path = `/api/regions/${encodeURIComponent(slug)}/stations/${encodeURIComponent(code)}`;
  const change = (part: Partial<StationDraft>) => setDraft((now) => ({ ...now, ...part }));

  async function finish(sent: Promise<SaveResult>, next: string) {
    setBusy(true);
    const result = await sent;
    setBusy(false);
    if (!result.ok) return setFailed(result);
    router.push(next);
    router.refresh();
  }

  function save(event: FormEvent) {
    event.preventDefault();
    setFailed(null);
    const read = readDraft(draft, facts);
    const derived = recipeDraft && readRecipe(recipeDraft, stations);
    const all = { ...read.problems, ...derived?.problems };
    setProblems(all);
    if (Object.keys(all).length > 0) {
      // After the next drawing: the fields get their marks then.
      setTimeout(() => form.current?.querySelector<HTMLElement>('[aria-invalid]')?.focus());
      return;
    }
    const isNewRecipe = derived && JSON.stringify(derived.recipe) !== JSON.stringify(recipe);
    const patch = { ...read.patch, ...(isNewRecipe ? { derived: derived.recipe } : {}) };
    void finish(sendStation(path, 'PATCH', patch, edition), back);
  }

  const wrong = Object.keys(problems).length;
  return (
    <form ref={form} className={styles.form} noValidate onSubmit={save}>
      {recipeDraft && (
        <section className={styles.section} aria-labelledby="recipe-title">
          <h2 id="recipe-title">Recipe</h2>
          <RecipeFields
            draft={recipeDraft}
            stations={stations.filter((station) => station.code !== code)}
            problems={problems}
            onChange={setRecipeDraft}
          />
        </section>
      )}
      <FactsFields draft={draft} problems={problems} onChange={change} />
      <ChangesFields changes={draft.changes} problems={problems} onChange={(changes) => change({ changes })} />
      <FlowsFields flows={draft.flows} problems={problems} onChange={(flows) => change({ flows })} />
      <section className={styles.section} aria-labelledby="notes-title">
        <h2 id="notes-title">Notes</h2>
        <FormField label="Notes on the station and its record" bare>
          {(control) => (
            <textarea
              {...control}
              className={styles.text}
              rows={5}
              value={draft.notes}
              onChange={(event) => change({ notes: event.target.value })}
            />
          )}
        </FormField>
      </section>
      {failed && (
        <ErrorNote
          title={failed.changedMeanwhile ? 'Somebody else changed this station meanwhile' : 'Nothing was saved'}
        >
          {failed.detail}{' '}
          {failed.changedMeanwhile && (
            <>
              Your entries still stand here. <a href={`${back.split('?')[0]}/edit`}>Read the station anew</a> to see
              what is stored; your entries are then gone.
            </>
          )}
        </ErrorNote>
      )}
      <div className={styles.buttons}>
        <button type="submit" className={ui.primary} disabled={busy}>
          {busy ? 'Saving…' : 'Save'}
        </button>
        <Link href={back} className={ui.button} prefetch={false}>
          Back without saving
        </Link>
        {wrong > 0 && (
          <span role="status" className={styles.problem}>
            {wrong === 1 ? 'One field' : `${wrong} fields`} cannot be saved as it stands.
          </span>
        )}
        {recipe && (
          <RemoveStation
            code={code}
            busy={busy}
            onRemove={() => finish(sendStation(path, 'DELETE', undefined), home)}
          />
        )}
      </div>
    </form>
  );
}

/** A derived station can be taken away whole: its days come from others. Asks once more. */
function RemoveStation({ code, busy, onRemove }: { code: string; busy: boolean; onRemove(): void }) {
  const [asked, setAsked] = useState(false);
  return (
    <button
      type="button"
      className={`${ui.button} ${styles.apart}`}
      disabled={busy}
      onClick={() => (asked ? onRemove() : setAsked(true))}
      onBlur={() => setAsked(false)}
    >
      {asked ? `Really take ${code} away?` : 'Take this station away'}
    </button>
  );
}
