'use client';
import { FormField } from '@/app/components/form-field';
import styles from '@/app/components/station-form/station-form.module.css';
import ui from '@/app/components/ui.module.css';
import { INFLUENCES, type Influence } from '@/lib/region/ranking-types';
import { AREA_UNITS, type AreaUnit } from '@/lib/series/area-units';
import type { Problems, StationDraft } from './station-draft.ts';

interface Props {
  draft: StationDraft;
  problems: Problems;
  onChange(change: Partial<StationDraft>): void;
}

/** Name, river, place, area and influence. */
export function FactsFields({ draft, problems, onChange }: Props) {
  const text = (name: 'name' | 'river' | 'latitude' | 'longitude', label: string, hint?: string) => (
    <FormField label={label} hint={hint} problem={problems[name]}>
      {(control) => (
        <input
          {...control}
          className={ui.input}
          inputMode={name === 'latitude' || name === 'longitude' ? 'decimal' : undefined}
          value={draft[name]}
          onChange={(event) => onChange({ [name]: event.target.value })}
        />
      )}
    </FormField>
  );
  return (
    <section className={styles.section} aria-labelledby="facts-title">
      <h2 id="facts-title">Facts</h2>
      <div className={styles.pair}>
        {text('name', 'Name')}
        {text('river', 'River')}
        {text('latitude', 'Latitude', 'Degrees, north above 0')}
        {text('longitude', 'Longitude', 'Degrees, east above 0')}
        <FormField
          label="Drainage area"
          hint="Kept in km². Empty where none means anything, as at a spring."
          problem={problems.area}
        >
          {(control) => (
            <span className={styles.area}>
              <input
                {...control}
                className={ui.input}
                inputMode="decimal"
                value={draft.area}
                onChange={(event) => onChange({ area: event.target.value })}
              />
              <select
                aria-label="Unit of the drainage area"
                className={ui.select}
                value={draft.areaUnit}
                onChange={(event) => onChange({ areaUnit: event.target.value as AreaUnit })}
              >
                {AREA_UNITS.map((unit) => (
                  <option key={unit}>{unit}</option>
                ))}
              </select>
            </span>
          )}
        </FormField>
        <FormField label="Influence" hint="What people do to the flow at the station, at it or above it.">
          {(control) => (
            <select
              {...control}
              className={ui.select}
              value={draft.influence}
              onChange={(event) => onChange({ influence: event.target.value as Influence })}
            >
              {INFLUENCES.map((influence) => (
                <option key={influence}>{influence}</option>
              ))}
            </select>
          )}
        </FormField>
      </div>
    </section>
  );
}
