'use client';
import { useState } from 'react';
import type { AlsoCandidate, Mapping } from '@/lib/intake/types';
import { QUANTITIES, type Quantity, UNITS_OF, type Unit } from '@/lib/series/quantities';
import ui from '../ui.module.css';
import { sentence } from './asked.ts';
import styles from './mapping.module.css';
import { unitText } from './unit-text.ts';
import { QUANTITY_WORDS } from './words.ts';

interface Props {
  series: readonly AlsoCandidate[];
  onTake(mapping: Partial<Mapping>): void;
}

/** The series of a document that holds none of the wanted quantity: one of a quantity that is kept here may be taken in
 *  its place. */
export function SeriesChoice({ series, onTake }: Props) {
  return (
    <fieldset className={styles.others}>
      <legend>Which of its series is to be taken, and as what?</legend>
      {series.map((one) => (
        <Series key={one.label} series={one} onTake={onTake} />
      ))}
    </fieldset>
  );
}

function Series({ series, onTake }: { series: AlsoCandidate; onTake: Props['onTake'] }) {
  const possible = quantitiesOf(series);
  const [quantity, setQuantity] = useState<Quantity | null>(
    series.quantity ?? (possible.length === 1 ? possible[0] : null),
  );
  const [unit, setUnit] = useState(series.unit);
  const samples = <span className={ui.hint}>{series.samples.slice(0, 4).join(' · ')}</span>;
  if (possible.length === 0) {
    return (
      <div className={styles.other}>
        <span>{sentence(`${series.label}: of no quantity that is kept here`)}</span>
        {samples}
      </div>
    );
  }
  const units: readonly Unit[] = quantity === null ? [] : UNITS_OF[quantity];
  const fits = unit !== null && units.includes(unit);
  return (
    <div className={styles.other}>
      <span>{series.label}</span>
      {series.quantity === null && (
        <select
          className={ui.select}
          aria-label={`${series.label} is`}
          value={quantity ?? ''}
          onChange={(event) => setQuantity(possible.find((one) => one === event.target.value) ?? null)}
        >
          <option value="">quantity…</option>
          {possible.map((one) => (
            <option key={one} value={one}>
              {QUANTITY_WORDS[one]}
            </option>
          ))}
        </select>
      )}
      {quantity !== null && (series.unit === null || !fits) && (
        <select
          className={ui.select}
          aria-label={`Unit of ${series.label}`}
          value={fits ? unit : ''}
          onChange={(event) => setUnit(units.find((one) => one === event.target.value) ?? null)}
        >
          <option value="">unit…</option>
          {units.map((one) => (
            <option key={one} value={one}>
              {unitText(one)}
            </option>
          ))}
        </select>
      )}
      <button
        type="button"
        className={ui.button}
        disabled={quantity === null || !fits}
        onClick={() => quantity !== null && onTake({ quantity, unit, where: series.where })}
      >
        {quantity === null ? 'Take it' : `Take it as ${QUANTITY_WORDS[quantity]}${fits ? ` in ${unitText(unit)}` : ''}`}
      </button>
      {samples}
    </div>
  );
}

/** What a series can be of: what the document says, or else what has its unit. */
function quantitiesOf({ quantity, unit }: AlsoCandidate): readonly Quantity[] {
  if (quantity !== null) return [quantity];
  return unit === null ? [] : QUANTITIES.filter((one) => UNITS_OF[one].includes(unit));
}
