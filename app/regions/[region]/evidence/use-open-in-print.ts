import { useEffect } from 'react';

/** Opens what is folded and marked `data-open-in-print` while the page is printed: nobody can unfold paper. */
export function useOpenInPrint(): void {
  useEffect(() => {
    let opened: HTMLDetailsElement[] = [];
    const open = () => {
      opened = [...document.querySelectorAll<HTMLDetailsElement>('details[data-open-in-print]:not([open])')];
      for (const details of opened) details.open = true;
    };
    const close = () => {
      for (const details of opened) details.open = false;
      opened = [];
    };
    window.addEventListener('beforeprint', open);
    window.addEventListener('afterprint', close);
    return () => {
      window.removeEventListener('beforeprint', open);
      window.removeEventListener('afterprint', close);
    };
  }, []);
}
