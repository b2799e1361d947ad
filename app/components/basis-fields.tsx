import type { ReactNode } from 'react';
import styles from './basis-editor.module.css';
import ui from './ui.module.css';

interface NumberFieldProps {
  name: string;
  label: string;
  value: number;
  unit?: string;
  children?: ReactNode;
}

/** A number as it is typed, with its unit and a hint. */
export function NumberField({ name, label, value, unit, children }: NumberFieldProps) {
  return (
    <label className={ui.label}>
      {label}
      <span className={styles.with}>
        <input name={name} inputMode="decimal" autoComplete="off" defaultValue={value} className={styles.number} />
        {unit}
      </span>
      {children && <span className={ui.hint}>{children}</span>}
    </label>
  );
}

export interface ChoicesProps {
  name: string;
  value: string;
  legend?: string;
  /** value, words, what it means */
  options: readonly (readonly [string, string, ReactNode])[];
  onChoose?: (value: string) => void;
  /** fields that belong to an option */
  under?: Record<string, ReactNode>;
}

/** One of several, each with what it means. */
export function Choices({ name, value, legend, options, onChoose, under = {} }: ChoicesProps) {
  return (
    <fieldset className={styles.set}>
      <legend className={legend ? undefined : 'visually-hidden'}>{legend ?? name}</legend>
      {options.map(([option, words, meaning]) => (
        <div key={option} className={styles.option}>
          <label className={styles.choice}>
            <input
              type="radio"
              name={name}
              value={option}
              {...(onChoose
                ? { checked: value === option, onChange: () => onChoose(option) }
                : { defaultChecked: value === option })}
            />
            <span>
              {words}
              {meaning && <small>{meaning}</small>}
            </span>
          </label>
          {under[option]}
        </div>
      ))}
    </fieldset>
  );
}
