'use client';
import ui from '@/app/components/ui.module.css';

export function PrintButton() {
  return (
    <button type="button" className={ui.button} onClick={() => window.print()}>
      Print this page
    </button>
  );
}
