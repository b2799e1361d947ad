import { type ReactElement, type ReactNode, useId } from 'react';
import styles from './form-field.module.css';
import ui from './ui.module.css';

interface FieldProps {
  label: string;
  hint?: ReactNode;
  /** what is wrong with the value, said beside the field; undefined while nothing is */
  problem?: string;
  /** keeps the label for screen readers only, where a heading of the list shows it already */
  bare?: boolean;
  className?: string;
  /** the control; gets its id, and what describes it */
  children(control: ControlProps): ReactElement;
}

export interface ControlProps {
  id: string;
  'aria-describedby'?: string;
  'aria-invalid'?: true;
}

/** One field of a form with its label, its hint, and what is wrong with it. */
export function FormField({ label, hint, problem, bare = false, className, children }: FieldProps) {
  const id = useId();
  const described = [hint ? `${id}-hint` : '', problem ? `${id}-problem` : ''].filter(Boolean).join(' ');
  return (
    <div className={`${styles.field} ${className ?? ''}`}>
      <label htmlFor={id} className={bare ? 'visually-hidden' : styles.label}>
        {label}
      </label>
      {children({
        id,
        ...(described ? { 'aria-describedby': described } : {}),
        ...(problem ? { 'aria-invalid': true } : {}),
      })}
      {hint && (
        <span id={`${id}-hint`} className={ui.hint}>
          {hint}
        </span>
      )}
      {problem && (
        <span id={`${id}-problem`} className={styles.problem}>
          <span aria-hidden="true">! </span>
          {problem}
        </span>
      )}
    </div>
  );
}
