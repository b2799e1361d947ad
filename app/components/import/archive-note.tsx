import type { ArchiveInShort } from '@/lib/jobs/upload-types';
import { count } from '../format.ts';
import styles from './mapping.module.css';

/** What a region's archive holds. Nothing of it has to be asked: it says itself how each of its files is read. */
export function ArchiveNote({ archive }: { archive: ArchiveInShort }) {
  const { name, layers, flows, documents, unread } = archive;
  const held = ['its stations', layers > 0 ? count(layers, 'map layer') : '', `the days of ${count(flows, 'import')}`];
  return (
    <section className={styles.detail} aria-label={`Archive of the region ${name}`}>
      <h3>The archive of the region “{name}”</h3>
      <p>
        It brings {inWords(held.filter(Boolean))}, with what people have said of stations and days. Each import is read
        as it was read the first time, under the rule that was chosen then.
      </p>
      {documents > 0 && (
        <p className={styles.note}>
          {count(documents, 'WaterML document')} {documents === 1 ? 'says' : 'say'} the same days a second time, and
          {documents === 1 ? ' is' : ' are'} not read.
        </p>
      )}
      {unread.length > 0 && (
        <p className={styles.problem}>
          Not read, because no part of the archive: {unread.slice(0, 10).join(', ')}
          {unread.length > 10 && ` and ${count(unread.length - 10, 'more file')}`}. Import{' '}
          {unread.length === 1 ? 'it' : 'them'} afterwards.
        </p>
      )}
    </section>
  );
}

const inWords = (parts: readonly string[]): string =>
  parts.length === 1 ? parts[0] : `${parts.slice(0, -1).join(', ')} and ${parts.at(-1)}`;
