'use client';
import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { type FormEvent, useRef, useState } from 'react';
import { FormField } from '@/app/components/form-field';
import { stationHref } from '@/app/components/links';
import { ErrorNote } from '@/app/components/notes';
import {
  newTerm,
  offered,
  type RecipeDraft,
  readRecipe,
  type StationChoice,
} from '@/app/components/station-form/recipe-draft';
import { RecipeFields } from '@/app/components/station-form/recipe-fields';
import { sendStation } from '@/app/components/station-form/send-station';
import styles from '@/app/components/station-form/station-form.module.css';
import ui from '@/app/components/ui.module.css';

interface Props {
  slug: string;
  stations: readonly StationChoice[];
  /** the station that the recipe begins with */
  from: StationChoice | null;
  home: string;
}

/** Code, name and recipe of a new derived station. */
export function DeriveForm({ slug, stations, from, home }: Props) {
  const router = useRouter();
  const form = useRef<HTMLFormElement>(null);
  const [code, setCode] = useState('');
  const [name, setName] = useState('');
  const [draft, setDraft] = useState<RecipeDraft>({
    ...{ quantity: 'flow', note: '' },
    terms: [newTerm(0, from ? offered(from) : ''), newTerm(1)],
  });
  const [problems, setProblems] = useState<Record<string, string>>({});
  const [failed, setFailed] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);

  async function make(event: FormEvent) {
    event.preventDefault();
    setFailed(null);
    const { recipe, problems: inRecipe } = readRecipe(draft, stations);
    const found: Record<string, string> = { ...inRecipe };
    if (code.trim() === '') found.code = 'A station needs a code.';
    if (stations.some((station) => station.code === code.trim())) found.code = 'A station has this code already.';
    if (name.trim() === '') found.name = 'A station needs a name.';
    setProblems(found);
    if (Object.keys(found).length > 0) {
      setTimeout(() => form.current?.querySelector<HTMLElement>('[aria-invalid]')?.focus());
      return;
    }
    setBusy(true);
    const body = { code: code.trim(), name: name.trim(), derived: recipe };
    const result = await sendStation(`/api/regions/${encodeURIComponent(slug)}/stations`, 'POST', body);
    setBusy(false);
    if (!result.ok) return setFailed(result.detail);
    router.push(stationHref(slug, body.code));
  }

  const text = (label: string, field: string, value: string, onValue: (value: string) => void, hint: string) => (
    <FormField label={label} hint={hint} problem={problems[field]}>
      {(control) => (
        <input {...control} className={ui.input} value={value} onChange={(event) => onValue(event.target.value)} />
      )}
    </FormField>
  );
  return (
    <form ref={form} className={styles.form} noValidate onSubmit={make}>
      <section className={styles.section} aria-labelledby="new-title">
        <h2 id="new-title">The new station</h2>
        <div className={styles.pair}>
          {text('Code', 'code', code, setCode, 'Text of your own; leading zeros count')}
          {text('Name', 'name', name, setName, 'As shown, such as “Weir Brook, naturalised”')}
        </div>
      </section>
      <section className={styles.section} aria-labelledby="recipe-title">
        <h2 id="recipe-title">Recipe</h2>
        <RecipeFields draft={draft} stations={stations} problems={problems} onChange={setDraft} />
      </section>
      {failed && <ErrorNote title="The station was not made">{failed}</ErrorNote>}
      <div className={styles.buttons}>
        <button type="submit" className={ui.primary} disabled={busy}>
          {busy ? 'Deriving…' : 'Derive the record'}
        </button>
        <Link href={home} className={ui.button} prefetch={false}>
          Back to the map
        </Link>
      </div>
    </form>
  );
}
