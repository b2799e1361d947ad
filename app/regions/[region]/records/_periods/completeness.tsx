'use client';
import { type FormEvent, useState } from 'react';
import ui from '@/app/components/ui.module.css';
import type { ResolvedBasis } from '@/lib/basis';
import type { OwnTerms } from './own-terms.ts';
import styles from './periods.module.css';

interface Props {
  basis: ResolvedBasis;
  onChange(keys: Partial<OwnTerms>): void;
}

/** The two terms of the basis that say how complete a station must be. */
export function Completeness({ basis, onChange }: Props) {
  const [years, setYears] = useState(String(basis.minYears));
  const [share, setShare] = useState(String(Number((basis.minCoverage * 100).toFixed(4))));
  const submit = (event: FormEvent) => {
    event.preventDefault();
    onChange({ minYears: String(Number(years)), minCoverage: String(Number((Number(share) / 100).toFixed(6))) });
  };
  return (
    <form className={styles.terms} onSubmit={submit} aria-label="Completeness">
      <label className={ui.label}>
        Usable years at least
        <input
          className={ui.input}
          type="number"
          required
          min={3}
          max={1000}
          step={1}
          value={years}
          onChange={(event) => setYears(event.currentTarget.value)}
        />
      </label>
      <label className={ui.label}>
        and of the period, %
        <input
          className={ui.input}
          type="number"
          required
          min={0}
          max={100}
          step="any"
          value={share}
          onChange={(event) => setShare(event.currentTarget.value)}
        />
      </label>
      <button type="submit" className={ui.button}>
        Count anew
      </button>
    </form>
  );
}
