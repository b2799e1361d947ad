'use client';
import { useId } from 'react';
import styles from './segmented.module.css';

interface Props<Value extends string> {
  label: string;
  value: Value;
  options: readonly { value: Value; label: string; title?: string }[];
  onChange(value: Value): void;
}

/** A choice among a few, all in sight: radio buttons drawn as one bar. */
export function Segmented<Value extends string>({ label, value, options, onChange }: Props<Value>) {
  const name = useId();
  return (
    <fieldset className={styles.group}>
      <legend>{label}</legend>
      <div className={styles.bar}>
        {options.map((option) => (
          <label key={option.value} title={option.title}>
            <input type="radio" name={name} checked={option.value === value} onChange={() => onChange(option.value)} />
            <span>{option.label}</span>
          </label>
        ))}
      </div>
    </fieldset>
  );
}
