'use client';
import dynamic from 'next/dynamic';
import { type ComponentProps, useState } from 'react';
import { Loading } from '@/app/components/notes';
import table from '../evidence-table.module.css';
import type { DrawAGroup as Drawing } from './draw-a-group.tsx';
import styles from './group.module.css';

/** The map and its drawing are only loaded when a group is to be drawn. */
const DrawAGroup = dynamic(() => import('./draw-a-group.tsx').then((part) => part.DrawAGroup), {
  ssr: false,
  loading: () => <Loading>Opening the map…</Loading>,
});

/** A group of the reader's own, drawn on a map. */
export function DrawingTool(props: ComponentProps<typeof Drawing>) {
  const [open, setOpen] = useState(false);
  return (
    <details className={`${table.details} ${styles.onScreen}`} onToggle={(event) => setOpen(event.currentTarget.open)}>
      <summary>{props.area === null ? 'Draw a group of stations' : 'Change the drawn group'}</summary>
      {open && <DrawAGroup {...props} />}
    </details>
  );
}
