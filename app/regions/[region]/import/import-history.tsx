import Link from 'next/link';
import { count, fixed } from '@/app/components/format';
import { revisionWords } from '@/app/components/import/revisions-table';
import { unitText } from '@/app/components/import/unit-text';
import { RULE_WORDS } from '@/app/components/import/words';
import { ScrollFrame } from '@/app/components/scroll-frame';
import type { OverlapRule } from '@/lib/store/lay-parts';
import type { Revisions } from '@/lib/store/revisions';
import styles from './import-page.module.css';
import { UndoImport } from './undo-import';

export interface ListedImport {
  id: number;
  /** ISO date and time, UTC */
  when: string;
  by: string;
  kind: string;
  fileName: string;
  unit: string;
  rows: number;
  accepted: number;
  rejected: number;
  sha256: string;
  rule: OverlapRule;
  /** what it did to days that stood; null where nobody counted */
  revisions: Revisions | null;
  /** is being taken back just now */
  undoing: boolean;
}

const KIND_WORDS: Record<string, string> = { flows: 'daily flows', registry: 'station list', layer: 'map layer' };

interface Props {
  slug: string;
  imports: readonly ListedImport[];
  /** the import whose report stands above */
  shown: number | null;
  /** the address' parameters, which links keep */
  query: string;
}

/** Every import that stands, newest first, each with its report and its way back. */
export function ImportHistory({ slug, imports, shown, query }: Props) {
  return (
    <section aria-labelledby="imports-title">
      <h2 id="imports-title">Imports so far</h2>
      {imports.length === 0 ? (
        <p className={styles.none}>None yet.</p>
      ) : (
        <ScrollFrame className={styles.scroll} label="Imports so far">
          <table className={styles.history}>
            <thead>
              <tr>
                <th scope="col">File</th>
                <th scope="col">What</th>
                <th scope="col">When (UTC)</th>
                <th scope="col">By</th>
                <th scope="col">Hash</th>
                <th scope="col">Against what stood</th>
                <th scope="col">Rows</th>
                <th scope="col">Accepted</th>
                <th scope="col">Rejected</th>
                <td />
              </tr>
            </thead>
            <tbody>
              {imports.map((entry) => (
                <tr key={entry.id}>
                  <th scope="row">
                    {entry.kind === 'flows' && entry.id !== shown ? (
                      <Link href={reportHref(query, entry.id)} prefetch={false} title="Show its report">
                        {entry.fileName}
                      </Link>
                    ) : (
                      entry.fileName
                    )}
                  </th>
                  <td>
                    {KIND_WORDS[entry.kind] ?? entry.kind}
                    {entry.unit && `, ${unitText(entry.unit)}`}
                  </td>
                  <td>
                    <time dateTime={entry.when}>{entry.when.slice(0, 16).replace('T', ' ')}</time>
                  </td>
                  <td>{entry.by || '–'}</td>
                  <td>
                    <code title={`SHA-256 of the file: ${entry.sha256}`}>{entry.sha256.slice(0, 8)}</code>
                  </td>
                  <td className={styles.against}>{againstWords(entry)}</td>
                  <td>{fixed(entry.rows)}</td>
                  <td>{fixed(entry.accepted)}</td>
                  <td>
                    {entry.rejected > 0 ? (
                      <a
                        href={`/api/regions/${encodeURIComponent(slug)}/imports/${entry.id}/rejected`}
                        title={`${count(entry.rejected, 'rejected row')} as CSV`}
                        download
                      >
                        {fixed(entry.rejected)}
                      </a>
                    ) : (
                      '0'
                    )}
                  </td>
                  <td>{entry.undoing ? 'being undone' : <UndoImport slug={slug} entry={entry} />}</td>
                </tr>
              ))}
            </tbody>
          </table>
        </ScrollFrame>
      )}
    </section>
  );
}

function reportHref(query: string, id: number): string {
  const next = new URLSearchParams(query);
  next.set('report', String(id));
  return `?${next}`;
}

/** Example: "365 days added, 5 of 7 unlike days took the new value (take the new values)" */
function againstWords({ revisions, rule }: ListedImport): string {
  const words = revisions ? revisionWords(revisions) : '';
  if (!words) return '–';
  return revisions && revisions.unlike > 0 ? `${words} (${RULE_WORDS[rule].toLowerCase()})` : words;
}
