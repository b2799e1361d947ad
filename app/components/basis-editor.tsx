'use client';
import { Popover } from '@base-ui/react/popover';
import { type FormEvent, useEffect, useRef, useState } from 'react';
import { type Basis, BasisError, basisToQuery, parseBasis } from '@/lib/basis';
import styles from './basis-editor.module.css';
import { TERM_FORMS } from './basis-forms.tsx';
import type { BasisTerm } from './basis-terms.tsx';
import { ErrorNote } from './notes.tsx';
import ui from './ui.module.css';

interface BasisEditorProps {
  term: BasisTerm;
  basis: Basis;
  base: Basis;
  resolved: { period: [number, number] | null; yearStart: number };
  onApply: (parameters: URLSearchParams) => void;
  onCancel: () => void;
}

/** The form of one term of the sentence. Enter or Apply uses it, Escape or Cancel leaves all as it was. */
export function BasisEditor({ term, basis, base, resolved, onApply, onCancel }: BasisEditorProps) {
  const form = useRef<HTMLFormElement>(null);
  const [problem, setProblem] = useState('');
  const { title, Fields, read } = TERM_FORMS[term];

  // the form arrives after its pop-up when it is loaded for the first time
  useEffect(() => {
    const field =
      form.current?.querySelector<HTMLElement>('input:checked') ??
      form.current?.querySelector<HTMLElement>('input, select');
    field?.focus();
  }, []);

  const submit = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    try {
      const next = parseBasis(read(new FormData(event.currentTarget)), basis);
      onApply(basisToQuery(next, base));
    } catch (error) {
      if (!(error instanceof BasisError)) throw error;
      setProblem(error.message);
    }
  };

  return (
    <form ref={form} className={styles.form} onSubmit={submit} noValidate>
      <Popover.Title className={styles.title}>{title}</Popover.Title>
      <Fields basis={basis} resolved={resolved} />
      {problem && <ErrorNote title="These terms cannot be used">{problem}</ErrorNote>}
      <div className={styles.actions}>
        <button type="submit" className={ui.primary}>
          Apply
        </button>
        <button type="button" className={ui.button} onClick={onCancel}>
          Cancel
        </button>
      </div>
    </form>
  );
}
