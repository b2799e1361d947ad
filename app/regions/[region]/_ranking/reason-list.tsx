'use client';
import Link from 'next/link';
import { useSearchParams } from 'next/navigation';
import { stationHref } from '@/app/components/links';
import { type HoverStore, useIsHovered } from '../hover-store.ts';
import type { MapRow } from '../map-row.ts';
import styles from './reason-list.module.css';

interface ReasonListProps {
  slug: string;
  rows: MapRow[];
  hover: HoverStore;
  selected: string | null;
}

/** Stations that are not ranked, each with the reason in words and figures. */
export function ReasonList({ slug, rows, hover, selected }: ReasonListProps) {
  const query = useSearchParams().toString();
  return (
    <ul className={styles.list}>
      {rows.map((row) => (
        <Reason
          key={row.code}
          row={row}
          href={stationHref(slug, row.code, query)}
          hover={hover}
          selected={row.code === selected}
        />
      ))}
    </ul>
  );
}

interface ReasonProps {
  row: MapRow;
  href: string;
  hover: HoverStore;
  selected: boolean;
}

function Reason({ row, href, hover, selected }: ReasonProps) {
  const hovered = useIsHovered(hover, row.code);
  return (
    <li
      className={styles.item}
      data-hovered={hovered || undefined}
      data-selected={selected || undefined}
      onPointerEnter={() => hover.set(row.code)}
      onPointerLeave={() => hover.set(null)}
    >
      <Link href={href} prefetch={false} onFocus={() => hover.set(row.code)} onBlur={() => hover.set(null)}>
        {row.name}
      </Link>
      {row.river && <span className={styles.river}> {row.river}</span>}
      <p>{row.unrankedReason}</p>
    </li>
  );
}
