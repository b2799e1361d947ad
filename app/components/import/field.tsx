'use client';
import { type ReactNode, useId } from 'react';
import ui from '../ui.module.css';
import styles from './mapping.module.css';

interface Props {
  label: string;
  hint?: string;
  /** why this has to be answered, or what is wrong with what was said */
  asked?: string | null;
  /** the control, given its id and the id of what stands below it */
  children: (ids: { id: string; 'aria-describedby': string | undefined; 'aria-invalid': boolean }) => ReactNode;
}

/** A control with its name above it and, right below, what has to be said about it. */
export function Field({ label, hint, asked = null, children }: Props) {
  const id = useId();
  const below = asked ?? hint;
  return (
    <div className={styles.field} data-asked={asked !== null || undefined}>
      <label htmlFor={id} className={styles.fieldName}>
        {label}
      </label>
      {children({
        ...{ id, 'aria-invalid': asked !== null },
        'aria-describedby': below === undefined ? undefined : `${id}-below`,
      })}
      {below !== undefined && (
        <p id={`${id}-below`} className={asked === null ? ui.hint : styles.asked}>
          {below}
        </p>
      )}
    </div>
  );
}

interface ChoiceProps<Value extends string> extends Omit<Props, 'children'> {
  value: Value | null;
  options: readonly { value: Value; words: string }[];
  /** words for "nothing chosen"; without them something always is */
  none?: string;
  onChange(value: Value | null): void;
}

/** A field that is one of a few. */
export function Choice<Value extends string>({ value, options, none, onChange, ...field }: ChoiceProps<Value>) {
  const empty = none ?? (value === null ? 'choose…' : null);
  return (
    <Field {...field}>
      {(ids) => (
        <select
          {...ids}
          className={ui.select}
          value={value ?? ''}
          onChange={(event) => onChange(options.find((option) => option.value === event.target.value)?.value ?? null)}
        >
          {empty !== null && <option value="">{empty}</option>}
          {options.map((option) => (
            <option key={option.value} value={option.value}>
              {option.words}
            </option>
          ))}
        </select>
      )}
    </Field>
  );
}
