import { type ComponentType, type ReactNode, useState } from 'react';
import { type Basis, EXCLUDABLE_FLAGS, MONTHS } from '@/lib/basis';
import styles from './basis-editor.module.css';
import type { BasisTerm } from './basis-terms.tsx';
import ui from './ui.module.css';

interface FieldsProps {
  basis: Basis;
  resolved: { period: [number, number] | null; yearStart: number };
}

interface TermForm {
  title: string;
  Fields: ComponentType<FieldsProps>;
  /** the basis keys the form speaks of; what cannot be read goes on as it is, for the schema to refuse in words */
  read: (form: FormData) => Record<string, unknown>;
}

const text = (form: FormData, name: string): string => String(form.get(name) ?? '').trim();

/** A number as typed, a decimal comma allowed; what is none stays text, so that the message can show it. */
const number = (form: FormData, name: string): unknown => {
  const typed = text(form, name).replace(',', '.');
  return typed !== '' && Number.isFinite(Number(typed)) ? Number(typed) : typed;
};

/** Percent as typed → share, free of binary tails: "12.5" → 0.125 */
const share = (form: FormData, name: string): unknown => {
  const percent = number(form, name);
  return typeof percent === 'number' ? Number((percent / 100).toFixed(6)) : percent;
};

export const TERM_FORMS: Record<BasisTerm, TermForm> = {
  days: {
    title: 'Length of the low',
    Fields: ({ basis }) => (
      <NumberField name="days" label="Days averaged" value={basis.days} unit="days">
        The lowest mean of this many days in a row, in each year. 7 evens out daily errors and gates; 30 shows drought.
      </NumberField>
    ),
    read: (form) => ({ days: number(form, 'days') }),
  },
  yearStart: { title: 'Low-flow year and season', Fields: YearFields, read: readYear },
  period: { title: 'Years compared', Fields: PeriodFields, read: readPeriod },
  completeness: {
    title: 'Which stations are ranked',
    Fields: ({ basis }) => (
      <>
        <NumberField name="minYears" label="Usable years, at least" value={basis.minYears} unit="years" />
        <NumberField name="minCoverage" label="Share of the period" value={asPercent(basis.minCoverage)} unit="%">
          Also asked of the first ten and the last ten years of the period.
        </NumberField>
        <NumberField name="maxMissingDays" label="Missing days a usable year may have" value={basis.maxMissingDays}>
          Of a whole year; fewer in a season, in proportion.
        </NumberField>
      </>
    ),
    read: (form) => ({
      minYears: number(form, 'minYears'),
      minCoverage: share(form, 'minCoverage'),
      maxMissingDays: number(form, 'maxMissingDays'),
    }),
  },
  rankBy: {
    title: 'Ranked by',
    Fields: ({ basis }) => (
      <Choices
        name="rankBy"
        value={basis.rankBy}
        options={[
          ['percent-per-decade', '% of the mean minimum per decade', 'Compares rivers of any size.'],
          ['specific-change', 'Change in L/s/km² per decade', 'Water lost per unit of area; needs a drainage area.'],
          ['kendall-tau', 'Kendall’s tau', 'How steadily the lows fall, however little.'],
        ]}
      />
    ),
    read: (form) => ({ rankBy: text(form, 'rankBy') }),
  },
  test: {
    title: 'Test of the trend',
    Fields: ({ basis }) => (
      <>
        <Choices
          name="serialCorrection"
          legend="Mann–Kendall, corrected for lows that carry over from year to year"
          value={basis.serialCorrection}
          options={[
            ['ar1-regional', 'With what the region’s stations share', 'Keeps false alarms near what is promised.'],
            ['ar1', 'Station by station', 'Noisier with short records.'],
            ['none', 'Not corrected', 'Too many alarms where years depend on one another.'],
          ]}
        />
        <NumberField name="alpha" label="False discoveries accepted" value={asPercent(basis.alpha)} unit="%">
          Of the stations called falling or rising, at most this share is expected to be so by chance.
        </NumberField>
      </>
    ),
    read: (form) => ({ serialCorrection: text(form, 'serialCorrection'), alpha: share(form, 'alpha') }),
  },
  exclude: {
    title: 'Values that count as missing',
    Fields: ({ basis }) => (
      <fieldset className={styles.set}>
        <legend>Days flagged as</legend>
        {EXCLUDABLE_FLAGS.map((flag) => (
          <label key={flag} className={ui.check}>
            <input type="checkbox" name="exclude" value={flag} defaultChecked={basis.exclude.includes(flag)} />
            {FLAG_WORDS[flag]}
          </label>
        ))}
      </fieldset>
    ),
    read: (form) => ({ exclude: form.getAll('exclude').map(String) }),
  },
  normalise: {
    title: 'Duration curves',
    Fields: ({ basis }) => (
      <Choices
        name="normalise"
        value={basis.normalise}
        options={[
          ['area', 'Per unit of drainage area', 'Leaves out stations without an area, by name.'],
          ['mean', 'As a ratio to each station’s mean flow', ''],
          ['median', 'As a ratio to each station’s median flow', ''],
          ['none', 'As measured', ''],
        ]}
      />
    ),
    read: (form) => ({ normalise: text(form, 'normalise') }),
  },
  units: {
    title: 'Units shown',
    Fields: ({ basis }) => (
      <Choices
        name="units"
        value={basis.units}
        options={[
          ['metric', 'Metric', 'm³/s, km², L/s/km²'],
          ['us', 'US', 'ft³/s, mi², ft³/s/mi²'],
        ]}
      />
    ),
    read: (form) => ({ units: text(form, 'units') }),
  },
};

const FLAG_WORDS: Record<(typeof EXCLUDABLE_FLAGS)[number], string> = {
  estimated: 'estimated',
  provisional: 'provisional',
  ice: 'ice-affected',
  'below-detection': 'below detection',
  suspect: 'suspect',
};

const asPercent = (value: number): number => Number((value * 100).toFixed(4));

function YearFields({ basis, resolved }: FieldsProps) {
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

function readYear(form: FormData): Record<string, unknown> {
  const start = text(form, 'yearStart');
  const [from, to] = [text(form, 'seasonFrom'), text(form, 'seasonTo')];
  // one month alone is a season of one month
  const season = from === '' && to === '' ? null : [Number(from || to), Number(to || from)];
  return { yearStart: start === 'auto' ? 'auto' : Number(start), season };
}

function PeriodFields({ basis, resolved }: FieldsProps) {
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

function readPeriod(form: FormData): Record<string, unknown> {
  const kind = text(form, 'period');
  if (kind === 'own') return { period: null };
  return { period: kind === 'years' ? [number(form, 'first'), number(form, 'last')] : 'common' };
}

interface NumberFieldProps {
  name: string;
  label: string;
  value: number;
  unit?: string;
  children?: ReactNode;
}

function NumberField({ name, label, value, unit, children }: NumberFieldProps) {
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

interface ChoicesProps {
  name: string;
  value: string;
  legend?: string;
  /** value, words, what it means */
  options: [string, string, string][];
  onChoose?: (value: string) => void;
  /** fields that belong to an option */
  under?: Record<string, ReactNode>;
}

function Choices({ name, value, legend, options, onChoose, under = {} }: ChoicesProps) {
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
