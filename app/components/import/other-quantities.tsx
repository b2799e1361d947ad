'use client';
import { useState } from 'react';
import type { AlsoCandidate, AlsoQuantity, Mapping } from '@/lib/intake/types';
import { QUANTITIES, UNITS_OF } from '@/lib/series/quantities';
import ui from '../ui.module.css';
import styles from './mapping.module.css';
import { unitText } from './unit-text.ts';
import { QUANTITY_WORDS } from './words.ts';

interface Props {
  others: readonly AlsoCandidate[];
  mapping: Mapping;
  asked: string | undefined;
  onChange(also: AlsoQuantity[] | undefined): void;
}

/** Further quantities that the file holds: each taken along when a person says so, and what it is of. */
export function OtherQuantities({ others, mapping, asked, onChange }: Props) {
  const also = mapping.also ?? [];
  if (others.length === 0) return null;
  const setTo = (candidate: AlsoCandidate, next: AlsoQuantity | null) => {
    const rest = also.filter((one) => !isOf(one, candidate));
    const all = next ? [...rest, next] : rest;
    onChange(all.length > 0 ? all : undefined);
  };
  return (
    <fieldset className={styles.others}>
      <legend>The file also holds</legend>
      {asked && <p className={styles.asked}>{asked}</p>}
      {others.map((candidate) => (
        <Other
          key={candidate.label}
          candidate={candidate}
          taken={also.find((one) => isOf(one, candidate)) ?? null}
          onChange={(next) => setTo(candidate, next)}
        />
      ))}
    </fieldset>
  );
}

const isOf = (one: AlsoQuantity, { value, where }: AlsoCandidate): boolean =>
  JSON.stringify([one.value, one.where ?? null]) === JSON.stringify([value, where ?? null]);

interface OtherProps {
  candidate: AlsoCandidate;
  taken: AlsoQuantity | null;
  onChange(next: AlsoQuantity | null): void;
}

function Other({ candidate, taken, onChange }: OtherProps) {
  const [quantity, setQuantity] = useState(taken?.quantity ?? candidate.quantity);
  const [unit, setUnit] = useState(taken?.unit ?? candidate.unit);
  const say = (nextQuantity: typeof quantity, nextUnit: typeof unit) => {
    const fits = nextQuantity !== null && nextUnit !== null && UNITS_OF[nextQuantity].includes(nextUnit);
    setQuantity(nextQuantity);
    setUnit(fits ? nextUnit : null);
    const { value, flag, where } = candidate;
    const also = fits ? { quantity: nextQuantity, unit: nextUnit, value, flag, ...(where ? { where } : {}) } : null;
    if (taken || also) onChange(also);
  };
  const known = candidate.quantity !== null && candidate.unit !== null;
  return (
    <div className={styles.other}>
      {known && (
        <label className={ui.check}>
          <input
            type="checkbox"
            checked={taken !== null}
            onChange={(event) => (event.target.checked ? say(candidate.quantity, candidate.unit) : onChange(null))}
          />
          {candidate.label}: {QUANTITY_WORDS[candidate.quantity ?? 'flow']} in {unitText(candidate.unit ?? '')}
        </label>
      )}
      {!known && (
        <>
          <span>{candidate.label} is</span>
          <select
            className={ui.select}
            aria-label={`${candidate.label} is`}
            value={quantity ?? ''}
            onChange={(event) => say(QUANTITIES.find((one) => one === event.target.value) ?? null, unit)}
          >
            <option value="">left out</option>
            {QUANTITIES.map((one) => (
              <option key={one} value={one}>
                {QUANTITY_WORDS[one]}
              </option>
            ))}
          </select>
          {quantity && (
            <select
              className={ui.select}
              aria-label={`Unit of ${candidate.label}`}
              value={unit ?? ''}
              onChange={(event) => say(quantity, UNITS_OF[quantity].find((one) => one === event.target.value) ?? null)}
            >
              <option value="">unit…</option>
              {UNITS_OF[quantity].map((one) => (
                <option key={one} value={one}>
                  {unitText(one)}
                </option>
              ))}
            </select>
          )}
        </>
      )}
      <span className={ui.hint}>{candidate.samples.slice(0, 4).join(' · ')}</span>
    </div>
  );
}
