'use client';
import dynamic from 'next/dynamic';
import Link from 'next/link';
import { useSearchParams } from 'next/navigation';
import { useQueryStates } from 'nuqs';
import { useState } from 'react';
import { Cautions } from '@/app/components/cautions';
import { apiHref, deriveHref, linksHref } from '@/app/components/links';
import { ErrorNote, Loading } from '@/app/components/notes';
import { Segmented } from '@/app/components/segmented';
import { useAnswer } from '@/app/components/use-answer';
import type { ResolvedBasis } from '@/lib/basis';
import type { RegionRecords } from '@/lib/jobs/records-types';
import type { OwnTerms } from './_periods/own-terms.ts';
import styles from './records-screen.module.css';
import { recordsState, type Section } from './records-state.ts';
import { YearsSection } from './years-section.tsx';

const FindingsSection = dynamic(() => import('./_findings/findings-section.tsx').then((part) => part.FindingsSection), {
  loading: () => <Loading>Opening the findings…</Loading>,
});
const PeriodsSection = dynamic(() => import('./_periods/periods-section.tsx').then((part) => part.PeriodsSection), {
  loading: () => <Loading>Opening the chart of periods…</Loading>,
});

const SECTIONS: readonly { value: Section; label: string }[] = [
  { value: 'years', label: 'Years' },
  { value: 'findings', label: 'Findings' },
  { value: 'periods', label: 'Common period' },
];

export interface NamedStation {
  code: string;
  name: string;
}

interface Props {
  slug: string;
  basis: ResolvedBasis;
  /** the region's own terms, which an address leaves unsaid */
  own: OwnTerms;
  stations: readonly NamedStation[];
}

/** The three ways to look at the records. What a person marks in one of them is seen in the others at once. */
export function RecordsScreen({ slug, basis, own, stations }: Props) {
  const query = useSearchParams().toString();
  const [{ show }, set] = useQueryStates(recordsState, { history: 'push' });
  const [version, setVersion] = useState(0);
  const onChanged = () => setVersion((now) => now + 1);
  const records = useAnswer<RegionRecords>(show === 'years' ? apiHref(slug, 'records', query) : null, version);

  return (
    <div className={styles.screen}>
      <div className={styles.sections}>
        <Segmented
          label="Show"
          value={show}
          options={SECTIONS}
          onChange={(value) => void set({ show: value, finding: null })}
        />
        <nav className={styles.ways} aria-label="More on the stations">
          <Link href={linksHref(slug, query)} prefetch={false}>
            Upstream and downstream
          </Link>
          <Link href={deriveHref(slug, null, query)} prefetch={false}>
            Derive a record
          </Link>
        </nav>
      </div>
      {show === 'years' &&
        (records.problem ? (
          <ErrorNote title="The records could not be read">{records.problem}</ErrorNote>
        ) : records.value ? (
          <YearsSection
            slug={slug}
            records={records.value}
            pending={records.pending}
            version={version}
            onChanged={onChanged}
          />
        ) : (
          <Loading>Reading the records…</Loading>
        ))}
      {show === 'findings' && (
        <FindingsSection slug={slug} basis={basis} stations={stations} version={version} onChanged={onChanged} />
      )}
      {show === 'periods' && <PeriodsSection slug={slug} basis={basis} own={own} />}
      <Cautions />
    </div>
  );
}
