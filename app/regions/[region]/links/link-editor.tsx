'use client';
import { useRouter } from 'next/navigation';
import { useId, useState } from 'react';
import { FormField } from '@/app/components/form-field';
import { ErrorNote } from '@/app/components/notes';
import { offered, type StationChoice } from '@/app/components/station-form/recipe-draft';
import { sendStation } from '@/app/components/station-form/send-station';
import form from '@/app/components/station-form/station-form.module.css';
import ui from '@/app/components/ui.module.css';
import type { LinkSuggestion } from '@/lib/region/link-suggestions';
import styles from './link-editor.module.css';
import { type Pair, PairList, pairLabel } from './pair-list.tsx';

interface Props {
  slug: string;
  /** the one station that the lists are about; null for the whole region */
  station?: string | null;
  stations: readonly StationChoice[];
  links: readonly (Pair & { id: number; source: string })[];
  suggested: readonly LinkSuggestion[];
  rejected: readonly Pair[];
}

const SOURCE_WORDS: Record<string, string> = {
  person: 'given by hand',
  'river-layer': 'from the river layer',
  'area-and-position': 'from area and place',
};

/** Which station lies below which: suggestions to confirm or reject, links to take away, and one to give by hand. */
export function LinkEditor({ slug, station = null, stations, links, suggested, rejected }: Props) {
  const router = useRouter();
  const [busy, setBusy] = useState(false);
  const [failed, setFailed] = useState<string | null>(null);
  const names = new Map(stations.map(({ code, name }) => [code, name]));
  const api = `/api/regions/${encodeURIComponent(slug)}/links`;

  async function run(request: ReturnType<typeof sendStation>) {
    setBusy(true);
    setFailed(null);
    const result = await request;
    if (!result.ok) setFailed(result.detail);
    router.refresh();
    setBusy(false);
  }
  const confirmed = ({ upstream, downstream, source }: Pair & { source: string }) => ({ upstream, downstream, source });
  const confirm = (pair: Pair & { source: string }) => run(sendStation(api, 'POST', confirmed(pair)));
  const reject = ({ upstream, downstream }: Pair, rejected: boolean) =>
    run(sendStation(`${api}/suggested`, 'POST', { upstream, downstream, rejected }));
  const action = (verb: string, pair: Pair, act: () => Promise<void>) => (
    <button
      type="button"
      className={ui.button}
      disabled={busy}
      aria-label={`${verb} ${pairLabel(pair)}`}
      onClick={() => void act()}
    >
      {verb}
    </button>
  );

  return (
    <section className={form.section} aria-labelledby="links-title">
      <h2 id="links-title">Upstream and downstream</h2>
      {failed && <ErrorNote title="This was not changed">{failed}</ErrorNote>}
      <h3>Suggested{suggested.length > 1 && ` (${suggested.length})`}</h3>
      {suggested.length === 0 && (
        <p className={form.caution}>Nothing is suggested{station === null ? '' : ' for this station'}.</p>
      )}
      {suggested.length > 1 && (
        <button
          type="button"
          className={ui.button}
          disabled={busy}
          onClick={() => void run(sendStation(api, 'POST', { links: suggested.map(confirmed) }))}
        >
          Confirm all {suggested.length}
        </button>
      )}
      {suggested.length > 0 && (
        <PairList
          slug={slug}
          label="Suggested links"
          pairs={suggested}
          names={names}
          reasonOf={({ reason }) => reason}
          actionsOf={(pair) => (
            <>
              {action('Confirm', pair, () => confirm(pair))}
              {action('Reject', pair, () => reject(pair, true))}
            </>
          )}
        />
      )}
      <h3>Confirmed{links.length > 1 && ` (${links.length})`}</h3>
      {links.length === 0 && <p className={form.caution}>No link yet.</p>}
      <PairList
        slug={slug}
        label="Confirmed links"
        pairs={links}
        names={names}
        reasonOf={({ source }) => SOURCE_WORDS[source] ?? source}
        actionsOf={(link) =>
          action('Take away', link, () => run(sendStation(`${api}/${link.id}`, 'DELETE', undefined)))
        }
      />
      {rejected.length > 0 && (
        <details>
          <summary>Rejected ({rejected.length})</summary>
          <PairList
            slug={slug}
            label="Rejected links"
            pairs={rejected}
            names={names}
            actionsOf={(pair) => action('Suggest again', pair, () => reject(pair, false))}
          />
        </details>
      )}
      <NewLink
        key={links.length}
        station={station}
        stations={stations}
        busy={busy}
        onGiven={(pair) => confirm({ ...pair, source: 'person' })}
      />
    </section>
  );
}

interface NewLinkProps {
  station: string | null;
  stations: readonly StationChoice[];
  busy: boolean;
  onGiven(pair: Pair): void;
}

/** A link given by hand. */
function NewLink({ station, stations, busy, onGiven }: NewLinkProps) {
  const list = useId();
  const own = stations.find(({ code }) => code === station);
  const [upper, setUpper] = useState(own ? offered(own) : '');
  const [lower, setLower] = useState('');
  const codeOf = (text: string) =>
    stations.find((each) => offered(each) === text.trim() || each.code === text.trim())?.code ?? null;
  const [upstream, downstream] = [codeOf(upper), codeOf(lower)];
  const field = (label: string, value: string, onValue: (value: string) => void) => (
    <FormField label={label}>
      {(control) => (
        <input
          {...control}
          className={ui.input}
          list={list}
          autoComplete="off"
          placeholder="code or name"
          value={value}
          onChange={(event) => onValue(event.target.value)}
        />
      )}
    </FormField>
  );
  return (
    <div className={styles.byHand}>
      <datalist id={list}>
        {stations.map((each) => (
          <option key={each.code} value={offered(each)} />
        ))}
      </datalist>
      {field('Upper station', upper, setUpper)}
      {field('Station below it', lower, setLower)}
      <button
        type="button"
        className={ui.button}
        disabled={busy || upstream === null || downstream === null}
        onClick={() => upstream !== null && downstream !== null && onGiven({ upstream, downstream })}
      >
        Add this link
      </button>
    </div>
  );
}
