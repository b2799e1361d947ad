'use client';
import ui from '@/app/components/ui.module.css';

export function PrintButton() {
  return (
    <button type="button" className={ui.plain} onClick={() => window.print()}>
      Print
    </button>
  );
}
