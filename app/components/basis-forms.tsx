import type { ComponentType } from 'react';
import { EXCLUDABLE_FLAGS, rankWords } from '@/lib/basis';
import styles from './basis-editor.module.css';
import { Choices, NumberField } from './basis-fields.tsx';
import { IndexFields } from './basis-index-fields.tsx';
import { number, share, text } from './basis-reading.ts';
import type { BasisTerm } from './basis-terms.tsx';
import { asPercent, TestFields } from './basis-test-fields.tsx';
import { type FieldsProps, PeriodFields, readPeriod, readYear, YearFields } from './basis-year-fields.tsx';
import ui from './ui.module.css';

interface TermForm {
  title: string;
  Fields: ComponentType<FieldsProps>;
  /** the basis keys the form speaks of; what cannot be read goes on as it is, for the schema to refuse in words */
  read: (form: FormData) => Record<string, unknown>;
}

const RANK_BY = [
  ['percent-per-decade', 'Compares rivers of any size.'],
  ['specific-change', 'The change itself; flows and volumes per unit of drainage area.'],
  ['kendall-tau', 'How steadily it changes, however little.'],
] as const;

export const TERM_FORMS: Record<BasisTerm, TermForm> = {
  days: {
    title: 'What is compared',
    Fields: IndexFields,
    read: (form) => ({ index: text(form, 'index'), days: number(form, 'days') }),
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
        options={RANK_BY.map(([rankBy, meaning]) => [rankBy, rankWords({ ...basis, rankBy }), meaning])}
      />
    ),
    read: (form) => ({ rankBy: text(form, 'rankBy') }),
  },
  test: {
    title: 'Test of the trend',
    Fields: TestFields,
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
