'use client';
import { useId } from 'react';
import { FormField } from '@/app/components/form-field';
import ui from '@/app/components/ui.module.css';
import { deriveText } from '@/lib/series/derive';
import { QUANTITIES, type Quantity, quantityWords } from '@/lib/series/quantities';
import { newTerm, offered, type RecipeDraft, readRecipe, type StationChoice, type TermDraft } from './recipe-draft.ts';
import styles from './station-form.module.css';

interface Props {
  draft: RecipeDraft;
  stations: readonly StationChoice[];
  /** shown once the form was sent */
  problems: Record<string, string>;
  onChange(draft: RecipeDraft): void;
}

/** The recipe of a derived record: which stations' days are added and taken away, and what that comes to in words. */
export function RecipeFields({ draft, stations, problems, onChange }: Props) {
  const list = useId();
  const { recipe } = readRecipe(draft, stations);
  const set = (key: number, change: Partial<TermDraft>) =>
    onChange({ ...draft, terms: draft.terms.map((term) => (term.key === key ? { ...term, ...change } : term)) });
  const next = Math.max(-1, ...draft.terms.map(({ key }) => key)) + 1;
  return (
    <>
      <datalist id={list}>
        {stations.map((station) => (
          <option key={station.code} value={offered(station)} />
        ))}
      </datalist>
      <div className={styles.pair}>
        <FormField label="Quantity">
          {(control) => (
            <select
              {...control}
              className={ui.select}
              value={draft.quantity}
              onChange={(event) => onChange({ ...draft, quantity: event.target.value as Quantity })}
            >
              {QUANTITIES.map((quantity) => (
                <option key={quantity} value={quantity}>
                  {quantityWords(quantity)}
                </option>
              ))}
            </select>
          )}
        </FormField>
      </div>
      <ol className={styles.rows} aria-label="Terms">
        {draft.terms.map((term, index) => (
          <li key={term.key} className={styles.term}>
            <FormField label={`Sign of term ${index + 1}`} bare>
              {(control) => (
                <select
                  {...control}
                  className={ui.select}
                  value={term.takesAway ? '-' : '+'}
                  onChange={(event) => set(term.key, { takesAway: event.target.value === '-' })}
                >
                  <option value="+">+ plus</option>
                  <option value="-">− minus</option>
                </select>
              )}
            </FormField>
            <FormField label="Factor" problem={problems[`terms.${term.key}.size`]}>
              {(control) => (
                <input
                  {...control}
                  className={ui.input}
                  inputMode="decimal"
                  value={term.size}
                  onChange={(event) => set(term.key, { size: event.target.value })}
                />
              )}
            </FormField>
            <FormField label="Station" problem={problems[`terms.${term.key}.station`]}>
              {(control) => (
                <input
                  {...control}
                  className={ui.input}
                  list={list}
                  autoComplete="off"
                  placeholder="code or name"
                  value={term.station}
                  onChange={(event) => set(term.key, { station: event.target.value })}
                />
              )}
            </FormField>
            <FormField label="Days before" problem={problems[`terms.${term.key}.lag`]}>
              {(control) => (
                <input
                  {...control}
                  className={ui.input}
                  inputMode="numeric"
                  value={term.lag}
                  onChange={(event) => set(term.key, { lag: event.target.value })}
                />
              )}
            </FormField>
            <button
              type="button"
              className={ui.button}
              aria-label={`Remove term ${index + 1}`}
              onClick={() => onChange({ ...draft, terms: draft.terms.filter(({ key }) => key !== term.key) })}
            >
              Remove
            </button>
          </li>
        ))}
      </ol>
      {problems.terms && <p className={styles.problem}>{problems.terms}</p>}
      <button
        type="button"
        className={ui.button}
        onClick={() => onChange({ ...draft, terms: [...draft.terms, newTerm(next)] })}
      >
        Add a term
      </button>
      <p className={styles.preview} aria-live="polite">
        {recipe.terms.length === 0
          ? 'No term can be read yet.'
          : `Each day: ${deriveText(recipe)}. A day has a value where all of its terms have one.`}
      </p>
      <FormField label="Note on the recipe" hint="Why these stations, and where factor and travel time come from.">
        {(control) => (
          <textarea
            {...control}
            className={styles.text}
            rows={2}
            value={draft.note}
            onChange={(event) => onChange({ ...draft, note: event.target.value })}
          />
        )}
      </FormField>
    </>
  );
}
