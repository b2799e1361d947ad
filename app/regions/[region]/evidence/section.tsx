'use client';
import Link from 'next/link';
import { type ReactNode, useEffect, useState } from 'react';
import ui from '@/app/components/ui.module.css';
import styles from './evidence.module.css';
import type { SectionId } from './evidence-state.ts';

interface Props {
  id: SectionId;
  title: string;
  /** what the section answers and how, in a sentence or two */
  lead: ReactNode;
  /** address of the section's table as CSV; null while there is none */
  csv: string | null;
  csvName: string;
  /** where the methods page tells how the figures come about */
  method?: string;
  children: ReactNode;
}

/** One question with its figures: an anchor of its own, a file of its own, and a way to print it alone. */
export function Section({ id, title, lead, csv, csvName, method, children }: Props) {
  const printAlone = usePrintAlone(id);
  return (
    <section id={id} className={styles.section} aria-labelledby={`${id}-title`} data-section={id}>
      <div className={styles.sectionHead}>
        <h2 id={`${id}-title`}>
          <a href={`#${id}`}>{title}</a>
        </h2>
        <div className={styles.sectionTools}>
          {method && (
            <Link href={`/methods#${method}`} prefetch={false} aria-label={`Method of “${title}”`}>
              Method
            </Link>
          )}
          <button type="button" className={ui.plain} onClick={printAlone} aria-label={`Print “${title}” alone`}>
            Print
          </button>
          {csv && (
            <a className={ui.button} href={csv} download>
              {csvName}
            </a>
          )}
        </div>
      </div>
      <p className={styles.lead}>{lead}</p>
      {children}
    </section>
  );
}

/** Prints the page with this section alone: the others are marked as left out until the print is over. */
function usePrintAlone(id: SectionId): () => void {
  const [printing, setPrinting] = useState(false);
  useEffect(() => {
    if (!printing) return;
    const others = [...document.querySelectorAll<HTMLElement>('[data-section]')].filter(
      (section) => section.dataset.section !== id,
    );
    for (const section of others) section.dataset.leftOut = '';
    window.print();
    for (const section of others) delete section.dataset.leftOut;
    setPrinting(false);
  }, [printing, id]);
  return () => setPrinting(true);
}
