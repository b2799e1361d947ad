'use client';
import { type FormEvent, useEffect, useState } from 'react';
import type { Mapping } from '@/lib/intake/types';
import ui from '../ui.module.css';
import styles from './mapping.module.css';
import { fetchMappings, removeMapping, type SavedMapping, saveMapping } from './upload-client.ts';
import { wordsOf } from './use-looks.ts';

interface Props {
  /** null while the region is yet to be made: nothing can be kept with it then */
  region: string | null;
  mapping: Mapping;
  onUse(mapping: Partial<Mapping>): void;
}

/** How the file is read, kept under a name to use again, or as JSON for the batch command. */
export function SavedMappings({ region, mapping, onUse }: Props) {
  const [saved, setSaved] = useState<SavedMapping[]>([]);
  const [chosen, setChosen] = useState<number | null>(null);
  const [said, setSaid] = useState<string | null>(null);
  useEffect(() => {
    if (region === null) return;
    let gone = false;
    fetchMappings(region)
      .then((found) => gone || setSaved(found))
      .catch((error: unknown) => gone || setSaid(wordsOf(error)));
    return () => {
      gone = true;
    };
  }, [region]);
  const used = saved.find(({ id }) => id === chosen);
  const remove = async (one: SavedMapping) => {
    try {
      await removeMapping(region ?? '', one.id);
      setSaved((now) => now.filter(({ id }) => id !== one.id));
      setChosen(null);
      setSaid(`“${one.name}” is removed. What was read by it stays.`);
    } catch (error) {
      setSaid(wordsOf(error));
    }
  };
  return (
    <section aria-label="Mapping to use again" className={styles.saved}>
      {saved.length > 0 && (
        <p className={styles.actions}>
          <select
            className={ui.select}
            aria-label="A mapping saved before"
            value={chosen ?? ''}
            onChange={(event) => {
              const one = saved.find(({ id }) => String(id) === event.target.value);
              setChosen(one?.id ?? null);
              if (one) onUse(one.mapping ?? {});
            }}
          >
            <option value="">Use a mapping saved before…</option>
            {saved.map(({ id, name }) => (
              <option key={id} value={id}>
                {name}
              </option>
            ))}
          </select>
          {used && (
            <button type="button" className={ui.plain} onClick={() => void remove(used)}>
              remove “{used.name}”
            </button>
          )}
        </p>
      )}
      {region !== null && (
        <SaveForm
          onSave={async (name) => {
            try {
              const one = await saveMapping(region, { name, mapping });
              setSaved((now) =>
                [...now.filter((other) => other.name !== one.name), one].sort((a, b) => a.name.localeCompare(b.name)),
              );
              setSaid(`Saved as “${one.name}”.`);
            } catch (error) {
              setSaid(wordsOf(error));
            }
          }}
        />
      )}
      <p role="status" className={ui.hint}>
        {said}
      </p>
      <MappingJson mapping={mapping} />
    </section>
  );
}

function SaveForm({ onSave }: { onSave(name: string): Promise<void> }) {
  const [name, setName] = useState('');
  const submit = (event: FormEvent) => {
    event.preventDefault();
    void onSave(name.trim()).then(() => setName(''));
  };
  return (
    <form className={styles.actions} onSubmit={submit}>
      <input
        className={ui.input}
        aria-label="Save this mapping as"
        placeholder="Save this mapping as…"
        required
        maxLength={200}
        value={name}
        onChange={(event) => setName(event.target.value)}
      />
      <button type="submit" className={ui.button}>
        Save
      </button>
    </form>
  );
}

function MappingJson({ mapping }: { mapping: Mapping }) {
  const [copied, setCopied] = useState(false);
  const text = JSON.stringify(mapping, null, 2);
  const copy = async () => {
    await navigator.clipboard.writeText(text).catch(() => undefined);
    setCopied(true);
  };
  return (
    <details className={styles.json}>
      <summary>As JSON, for the import command’s --mapping</summary>
      <pre>{text}</pre>
      <p className={styles.actions}>
        <button type="button" className={ui.button} onClick={() => void copy()}>
          {copied ? 'Copied' : 'Copy'}
        </button>
        <a
          className={ui.button}
          download="mapping.json"
          href={`data:application/json;charset=utf-8,${encodeURIComponent(text)}`}
        >
          Download
        </a>
      </p>
    </details>
  );
}
