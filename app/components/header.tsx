'use client';
import Link from 'next/link';
import { useSearchParams } from 'next/navigation';
import styles from './header.module.css';
import { type RegionPage, regionHref } from './links.ts';
import { ThemeSwitch } from './theme-switch.tsx';

const PAGES: { page: RegionPage; label: string }[] = [
  { page: 'map', label: 'Map' },
  { page: 'evidence', label: 'Evidence' },
  { page: 'curves', label: 'Curves' },
  { page: 'records', label: 'Records' },
  { page: 'import', label: 'Import' },
];

interface HeaderProps {
  /** the region the page is about, or null on pages above regions */
  region?: { slug: string; name: string; invented: boolean } | null;
  /** which entry of the region's navigation the page is; null for a station's page */
  page?: RegionPage | null;
}

/** Name of the program, name of the region, the way between its pages, the theme. Links keep basis and map view. */
export function Header({ region = null, page = null }: HeaderProps) {
  const query = useSearchParams().toString();
  return (
    <header className={styles.header}>
      <Link href="/" prefetch={false} className={styles.brand}>
        <Stone />
        <span className={region ? styles.word : undefined}>Hungerstone</span>
      </Link>
      {region && (
        <>
          <span className={styles.region} title={region.name}>
            <span className={styles.name}>{region.name}</span>
            {region.invented && <em className={styles.invented}> (invented)</em>}
          </span>
          <nav aria-label={`Pages of ${region.name}`} className={styles.nav}>
            {PAGES.map((entry) => (
              <Link
                key={entry.page}
                href={regionHref(region.slug, entry.page, query)}
                prefetch={false}
                aria-current={entry.page === page ? 'page' : undefined}
                className={styles.link}
              >
                {entry.label}
              </Link>
            ))}
          </nav>
        </>
      )}
      <span className={styles.end}>
        <ThemeSwitch />
      </span>
    </header>
  );
}

/** A stone in low water, with the mark cut into it. */
function Stone() {
  return (
    <svg viewBox="0 0 24 24" width="22" height="22" aria-hidden="true" className={styles.stone}>
      <path d="M3 15c.6-5.6 4-10 8.6-10S20.2 9 21 15z" fill="var(--ink)" />
      <path d="M9 11.5h6M10.2 8.8h3.6" stroke="var(--paper)" strokeWidth="1.3" />
      <path d="M1.5 18.2q2.6-1.6 5.2 0t5.2 0 5.2 0 5.2 0" fill="none" stroke="var(--water)" strokeWidth="1.5" />
    </svg>
  );
}
