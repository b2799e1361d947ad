import { useState } from 'react';
import { type Basis, MONTHS } from '@/lib/basis';
import styles from './basis-editor.module.css';
import { Choices } from './basis-fields.tsx';
import { number, text } from './basis-reading.ts';
import ui from './ui.module.css';

export interface FieldsProps {
  basis: Basis;
  resolved: { period: [number, number] | null; yearStart: number };
}

/** Start of the low-flow year, and the season looked at. */
export function YearFields({ basis, resolved }: FieldsProps) {
  return (
    <>
      <label className={ui.label}>
        The year begins in
        <select name="yearStart" defaultValue={String(basis.yearStart)} className={ui.select}>
          <option value="auto">the region’s wettest month ({MONTHS[resolved.yearStart - 1]} here)</option>
          <MonthOptions />
        </select>
        <span className={ui.hint}>A start in the wettest month keeps each year’s low in one year.</span>
      </label>
      <fieldset className={styles.set}>
        <legend>Lows looked for</legend>
        <div className={styles.pair}>
          <select
            name="seasonFrom"
            aria-label="First month of the season"
            defaultValue={String(basis.season?.[0] ?? '')}
            className={ui.select}
          >
            <option value="">in the whole year</option>
            <MonthOptions />
          </select>
          to
          <select
            name="seasonTo"
            aria-label="Last month of the season"
            defaultValue={String(basis.season?.[1] ?? '')}
            className={ui.select}
          >
            <option value="">–</option>
            <MonthOptions />
          </select>
        </div>
      </fieldset>
    </>
  );
}

function MonthOptions() {
  return MONTHS.map((month, index) => (
    <option key={month} value={index + 1}>
      {month}
    </option>
  ));
}

export function readYear(form: FormData): Record<string, unknown> {
  const start = text(form, 'yearStart');
  const [from, to] = [text(form, 'seasonFrom'), text(form, 'seasonTo')];
  // one month alone is a season of one month
  const season = from === '' && to === '' ? null : [Number(from || to), Number(to || from)];
  return { yearStart: start === 'auto' ? 'auto' : Number(start), season };
}

/** The years compared. */
export function PeriodFields({ basis, resolved }: FieldsProps) {
  const [first, last] = Array.isArray(basis.period) ? basis.period : (resolved.period ?? ['', '']);
  const [kind, setKind] = useState(basis.period === null ? 'own' : basis.period === 'common' ? 'common' : 'years');
  const years = (
    <span className={styles.pair}>
      <YearField name="first" label="First low-flow year" value={first} onFocus={() => setKind('years')} />
      to
      <YearField name="last" label="Last low-flow year" value={last} onFocus={() => setKind('years')} />
    </span>
  );
  return (
    <Choices
      name="period"
      legend="Low-flow years, each named by the year in which it begins"
      value={kind}
      onChoose={setKind}
      options={[
        ['common', 'The common period', 'The years that give the most stations × years.'],
        ['years', 'These years', ''],
        ['own', 'Each station’s own years', 'Periods then differ, and so may what made the trend.'],
      ]}
      under={{ years }}
    />
  );
}

function YearField(props: { name: string; label: string; value: number | string; onFocus: () => void }) {
  const { name, label, value, onFocus } = props;
  return (
    <input
      name={name}
      aria-label={label}
      inputMode="numeric"
      autoComplete="off"
      defaultValue={value}
      onFocus={onFocus}
      className={styles.number}
    />
  );
}

export function readPeriod(form: FormData): Record<string, unknown> {
  const kind = text(form, 'period');
  if (kind === 'own') return { period: null };
  return { period: kind === 'years' ? [number(form, 'first'), number(form, 'last')] : 'common' };
}
