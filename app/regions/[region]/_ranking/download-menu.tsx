'use client';
import { Popover } from '@base-ui/react/popover';
import { useSearchParams } from 'next/navigation';
import { useState } from 'react';
import { count } from '@/app/components/format';
import { apiHref } from '@/app/components/links';
import { ErrorNote } from '@/app/components/notes';
import ui from '@/app/components/ui.module.css';
import { csvOfStations } from './csv-subset.ts';
import styles from './download-menu.module.css';

interface DownloadMenuProps {
  slug: string;
  /** codes in the list as it is shown */
  shown: string[];
  all: number;
}

/** The ranking as files: what is shown, or every station, with the terms of comparison in the metadata beside it. */
export function DownloadMenu({ slug, shown, all }: DownloadMenuProps) {
  const query = useSearchParams().toString();
  const [problem, setProblem] = useState('');
  const csv = apiHref(slug, 'ranking', query, 'csv');

  const saveShown = async () => {
    setProblem('');
    try {
      const answer = await fetch(csv);
      if (!answer.ok) throw new Error(`the server answered ${answer.status}`);
      save(csvOfStations(await answer.text(), new Set(shown)), `${slug}-ranking-shown.csv`);
    } catch (error) {
      setProblem(`The file could not be made: ${error instanceof Error ? error.message : 'no answer'}. Try again.`);
    }
  };

  return (
    <Popover.Root>
      <Popover.Trigger className={ui.primary}>Ranked CSV</Popover.Trigger>
      <Popover.Portal>
        <Popover.Positioner sideOffset={6} align="end" collisionPadding={12} className={ui.layer}>
          <Popover.Popup className={ui.popup}>
            <div className={styles.menu}>
              <Popover.Title className={styles.title}>Download the ranking</Popover.Title>
              <button type="button" className={styles.item} onClick={saveShown} disabled={shown.length === 0}>
                CSV of what is shown <small>{count(shown.length, 'station')}, same columns</small>
              </button>
              <a className={styles.item} href={csv} download={`${slug}-ranking.csv`}>
                CSV of all <small>{count(all, 'station')}, ranked or not</small>
              </a>
              <a
                className={styles.item}
                href={apiHref(slug, 'ranking', query, 'geojson')}
                download={`${slug}-ranking.geojson`}
              >
                GeoJSON <small>for a map</small>
              </a>
              <a
                className={styles.item}
                href={apiHref(slug, 'ranking', query, 'json')}
                download={`${slug}-ranking.json`}
              >
                JSON <small>for a script</small>
              </a>
              <a
                className={styles.item}
                href={apiHref(slug, 'ranking', query, 'metadata')}
                download={`${slug}-ranking.csv-metadata.json`}
              >
                Metadata of the CSV <small>columns, units, terms, data hash</small>
              </a>
              {problem && <ErrorNote>{problem}</ErrorNote>}
            </div>
          </Popover.Popup>
        </Popover.Positioner>
      </Popover.Portal>
    </Popover.Root>
  );
}

function save(text: string, name: string): void {
  const url = URL.createObjectURL(new Blob([text], { type: 'text/csv' }));
  const link = document.createElement('a');
  link.href = url;
  link.download = name;
  link.click();
  // the browser has taken the address by the next task
  setTimeout(() => URL.revokeObjectURL(url), 0);
}
