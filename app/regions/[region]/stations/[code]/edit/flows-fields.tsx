'use client';
import { FormField } from '@/app/components/form-field';
import styles from '@/app/components/station-form/station-form.module.css';
import ui from '@/app/components/ui.module.css';
import { FLOW_UNITS, type FlowUnit } from '@/lib/series/flow-units';
import { NAMED_FLOW_KINDS, type NamedFlowKind } from '@/lib/series/station-history';
import { MONTHS } from '../named-levels';
import { ALL_YEAR, type FlowDraft, type Problems } from './station-draft.ts';

interface Props {
  flows: readonly FlowDraft[];
  problems: Problems;
  onChange(flows: FlowDraft[]): void;
}

/** Flows that mean something at the station. */
export function FlowsFields({ flows, problems, onChange }: Props) {
  const set = (key: number, change: Partial<FlowDraft>) =>
    onChange(flows.map((each) => (each.key === key ? { ...each, ...change } : each)));
  const next = Math.max(-1, ...flows.map(({ key }) => key)) + 1;
  return (
    <section className={styles.section} aria-labelledby="flows-title">
      <h2 id="flows-title">Named flows</h2>
      <p className={styles.caution}>
        Lines on the figures, for screening. A permit or a water right needs the responsible authority’s own method and
        value; local codes come first.
      </p>
      <ul className={styles.rows} aria-label="Named flows">
        {flows.map((flow, index) => (
          <li key={flow.key} className={styles.flow}>
            <FormField label="Name" className={styles.wide} problem={problems[`flows.${flow.key}.name`]}>
              {(control) => (
                <input
                  {...control}
                  className={ui.input}
                  value={flow.name}
                  onChange={(event) => set(flow.key, { name: event.target.value })}
                />
              )}
            </FormField>
            <FormField label="Kind" className={styles.wide}>
              {(control) => (
                <select
                  {...control}
                  className={ui.select}
                  value={flow.kind}
                  onChange={(event) => set(flow.key, { kind: event.target.value as NamedFlowKind })}
                >
                  {NAMED_FLOW_KINDS.map((kind) => (
                    <option key={kind}>{kind}</option>
                  ))}
                </select>
              )}
            </FormField>
            <FormField label="Value" problem={problems[`flows.${flow.key}.value`]}>
              {(control) => (
                <input
                  {...control}
                  className={ui.input}
                  inputMode="decimal"
                  value={flow.value}
                  onChange={(event) => set(flow.key, { value: event.target.value })}
                />
              )}
            </FormField>
            <FormField label="Unit">
              {(control) => (
                <select
                  {...control}
                  className={ui.select}
                  value={flow.unit}
                  onChange={(event) => set(flow.key, { unit: event.target.value as FlowUnit })}
                >
                  {FLOW_UNITS.map((unit) => (
                    <option key={unit}>{unit}</option>
                  ))}
                </select>
              )}
            </FormField>
            <button
              type="button"
              className={ui.button}
              aria-label={`Remove flow ${index + 1}`}
              onClick={() => onChange(flows.filter(({ key }) => key !== flow.key))}
            >
              Remove
            </button>
            <MonthBoxes
              flow={flow}
              problem={problems[`flows.${flow.key}.months`]}
              onMonths={(months) => set(flow.key, { months })}
            />
          </li>
        ))}
      </ul>
      <button
        type="button"
        className={ui.button}
        onClick={() =>
          onChange([
            ...flows,
            { key: next, name: '', kind: 'legal minimum', value: '', unit: 'm3/s', months: ALL_YEAR },
          ])
        }
      >
        Add a named flow
      </button>
    </section>
  );
}

interface MonthProps {
  flow: FlowDraft;
  problem?: string;
  onMonths(months: number[]): void;
}

function MonthBoxes({ flow, problem, onMonths }: MonthProps) {
  return (
    <fieldset className={styles.months}>
      <legend>Months in which it holds</legend>
      {MONTHS.map((name, index) => {
        const month = index + 1;
        const holds = flow.months.includes(month);
        return (
          <label key={name} className={ui.check}>
            <input
              type="checkbox"
              checked={holds}
              onChange={() => onMonths(holds ? flow.months.filter((each) => each !== month) : [...flow.months, month])}
            />
            {name}
          </label>
        );
      })}
      {problem && <span className={styles.problem}>{problem}</span>}
    </fieldset>
  );
}
