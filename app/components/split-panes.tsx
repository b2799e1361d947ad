'use client';
import { type CSSProperties, type KeyboardEvent, type PointerEvent, type ReactNode, useId, useRef } from 'react';
import styles from './split-panes.module.css';

interface SplitPanesProps {
  /** width of the first pane, percent */
  share: number;
  /** told when the divider has come to rest */
  onShare: (share: number) => void;
  /** what the divider parts, for those who hear it */
  label: string;
  /** narrowest and widest the first pane may be, percent */
  limits: [number, number];
  /** what a double click or Enter goes back to */
  usual: number;
  first: ReactNode;
  second: ReactNode;
}

/** Two panes side by side and a divider between them, as WAI-ARIA's window splitter: dragged, or moved by arrow keys
 *  (with Shift in larger steps), to the ends by Home and End. While it is dragged only the style moves; React renders
 *  when it rests. */
export function SplitPanes({ share, onShare, label, limits, usual, first, second }: SplitPanesProps) {
  const firstId = useId();
  const frame = useRef<HTMLDivElement>(null);
  const [least, most] = limits;
  const within = (value: number) => Math.round(Math.min(most, Math.max(least, value)));

  const shareAt = (event: PointerEvent) => {
    const box = frame.current?.getBoundingClientRect();
    return box?.width ? within(((event.clientX - box.left) / box.width) * 100) : share;
  };
  const show = (value: number) => frame.current?.style.setProperty('--share', `${value}%`);

  const onKeyDown = (event: KeyboardEvent) => {
    const step = event.shiftKey ? 10 : 2;
    const next: Record<string, number> = {
      ArrowLeft: share - step,
      ArrowRight: share + step,
      Home: least,
      End: most,
      Enter: usual,
    };
    if (!(event.key in next)) return;
    event.preventDefault();
    onShare(within(next[event.key]));
  };

  return (
    <div ref={frame} className={styles.frame} style={{ '--share': `${within(share)}%` } as CSSProperties}>
      <div id={firstId} className={styles.first}>
        {first}
      </div>
      <hr
        tabIndex={0}
        aria-orientation="vertical"
        aria-label={label}
        aria-controls={firstId}
        aria-valuenow={within(share)}
        aria-valuemin={least}
        aria-valuemax={most}
        className={styles.divider}
        onKeyDown={onKeyDown}
        onDoubleClick={() => onShare(usual)}
        onPointerDown={(event) => {
          event.currentTarget.setPointerCapture(event.pointerId);
          event.preventDefault();
          event.currentTarget.focus({ preventScroll: true });
        }}
        onPointerMove={(event) => {
          if (event.currentTarget.hasPointerCapture(event.pointerId)) show(shareAt(event));
        }}
        onPointerUp={(event) => {
          if (!event.currentTarget.hasPointerCapture(event.pointerId)) return;
          event.currentTarget.releasePointerCapture(event.pointerId);
          onShare(shareAt(event));
        }}
        onPointerCancel={() => show(within(share))}
      />
      <div className={styles.second}>{second}</div>
    </div>
  );
}
