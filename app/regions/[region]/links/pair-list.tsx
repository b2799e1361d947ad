'use client';
import Link from 'next/link';
import { type ReactNode, useState } from 'react';
import { stationHref } from '@/app/components/links';
import ui from '@/app/components/ui.module.css';
import styles from './link-editor.module.css';

export interface Pair {
  upstream: string;
  downstream: string;
}

interface Props<One extends Pair> {
  slug: string;
  /** what the list is called */
  label: string;
  pairs: readonly One[];
  /** names of stations by code */
  names: ReadonlyMap<string, string>;
  reasonOf?(pair: One): string;
  actionsOf(pair: One): ReactNode;
}

/** Pairs put into the page at once. */
const PAGE = 50;

export const pairLabel = ({ upstream, downstream }: Pair): string => `${upstream} to ${downstream}`;

/** Pairs of stations, each with why and with what can be done; long lists a page at a time. */
export function PairList<One extends Pair>({ slug, label, pairs, names, reasonOf, actionsOf }: Props<One>) {
  const [shown, setShown] = useState(PAGE);
  return (
    <>
      <ul className={styles.list} aria-label={label}>
        {pairs.slice(0, shown).map((pair) => (
          <li key={pairLabel(pair)}>
            <div>
              <StationLink slug={slug} code={pair.upstream} name={names.get(pair.upstream)} />{' '}
              <span aria-hidden="true">→</span>
              <span className="visually-hidden"> flows to </span>{' '}
              <StationLink slug={slug} code={pair.downstream} name={names.get(pair.downstream)} />
              {reasonOf && <p className={styles.reason}>{reasonOf(pair)}</p>}
            </div>
            {actionsOf(pair)}
          </li>
        ))}
      </ul>
      {shown < pairs.length && (
        <button type="button" className={ui.button} onClick={() => setShown(shown + PAGE)}>
          Show {Math.min(PAGE, pairs.length - shown)} more of {pairs.length}
        </button>
      )}
    </>
  );
}

function StationLink({ slug, code, name }: { slug: string; code: string; name?: string }) {
  return (
    <Link href={stationHref(slug, code)} prefetch={false}>
      {code} {name}
    </Link>
  );
}
