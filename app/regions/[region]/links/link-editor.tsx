'use client';
import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { useId, useState } from 'react';
import { FormField } from '@/app/components/form-field';
import { stationHref } from '@/app/components/links';
import { ErrorNote } from '@/app/components/notes';
import { offered, type StationChoice } from '@/app/components/station-form/recipe-draft';
import { sendStation } from '@/app/components/station-form/send-station';
import form from '@/app/components/station-form/station-form.module.css';
import ui from '@/app/components/ui.module.css';
import type { LinkSuggestion } from '@/lib/region/link-suggestions';
import styles from './link-editor.module.css';

interface Pair {
  upstream: string;
  downstream: string;
}

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

  async function run(requests: (() => ReturnType<typeof sendStation>)[]) {
    setBusy(true);
    setFailed(null);
    for (const request of requests) {
      const result = await request();
      if (!result.ok) {
        setFailed(result.detail);
        break;
      }
    }
    router.refresh();
    setBusy(false);
  }
  const confirm =
    ({ upstream, downstream, source }: Pair & { source: string }) =>
    () =>
      sendStation(api, 'POST', { upstream, downstream, source });
  const reject =
    ({ upstream, downstream }: Pair, to: boolean) =>
    () =>
      sendStation(`${api}/suggested`, 'POST', { upstream, downstream, rejected: to });
  const remove = (id: number) => () => sendStation(`${api}/${id}`, 'DELETE', undefined);
  const words = ({ upstream, downstream }: Pair) => (
    <span className={styles.pair}>
      <StationLink slug={slug} code={upstream} name={names.get(upstream)} /> <span aria-hidden="true">→</span>
      <span className="visually-hidden"> flows to </span>{' '}
      <StationLink slug={slug} code={downstream} name={names.get(downstream)} />
    </span>
  );
  const label = ({ upstream, downstream }: Pair) => `${upstream} to ${downstream}`;

  return (
    <section className={form.section} aria-labelledby="links-title">
      <h2 id="links-title">Upstream and downstream</h2>
      {failed && <ErrorNote title="This link was not changed">{failed}</ErrorNote>}
      <h3>Suggested</h3>
      {suggested.length === 0 ? (
        <p className={form.caution}>Nothing is suggested{station === null ? '' : ' for this station'}.</p>
      ) : (
        <ul className={styles.list} aria-label="Suggested links">
          {suggested.map((pair) => (
            <li key={label(pair)}>
              <div>
                {words(pair)}
                <p className={styles.reason}>{pair.reason}</p>
              </div>
              <button
                type="button"
                className={ui.button}
                disabled={busy}
                aria-label={`Confirm ${label(pair)}`}
                onClick={() => run([confirm(pair)])}
              >
                Confirm
              </button>
              <button
                type="button"
                className={ui.button}
                disabled={busy}
                aria-label={`Reject ${label(pair)}`}
                onClick={() => run([reject(pair, true)])}
              >
                Reject
              </button>
            </li>
          ))}
        </ul>
      )}
      {suggested.length > 1 && (
        <button type="button" className={ui.button} disabled={busy} onClick={() => run(suggested.map(confirm))}>
          Confirm all {suggested.length}
        </button>
      )}
      <h3>Confirmed</h3>
      {links.length === 0 && <p className={form.caution}>No link yet.</p>}
      <ul className={styles.list} aria-label="Confirmed links">
        {links.map((link) => (
          <li key={link.id}>
            <div>
              {words(link)}
              <p className={styles.reason}>{SOURCE_WORDS[link.source] ?? link.source}</p>
            </div>
            <button
              type="button"
              className={ui.button}
              disabled={busy}
              aria-label={`Take away ${label(link)}`}
              onClick={() => run([remove(link.id)])}
            >
              Take away
            </button>
          </li>
        ))}
      </ul>
      {rejected.length > 0 && (
        <details>
          <summary>Rejected ({rejected.length})</summary>
          <ul className={styles.list} aria-label="Rejected links">
            {rejected.map((pair) => (
              <li key={label(pair)}>
                {words(pair)}
                <button
                  type="button"
                  className={ui.button}
                  disabled={busy}
                  aria-label={`Suggest again ${label(pair)}`}
                  onClick={() => run([reject(pair, false)])}
                >
                  Suggest again
                </button>
              </li>
            ))}
          </ul>
        </details>
      )}
      <NewLink
        key={links.length}
        station={station}
        stations={stations}
        busy={busy}
        onGiven={(pair) => run([confirm({ ...pair, source: 'person' })])}
      />
    </section>
  );
}

function StationLink({ slug, code, name }: { slug: string; code: string; name?: string }) {
  return (
    <Link href={stationHref(slug, code)} prefetch={false}>
      {code} {name}
    </Link>
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
