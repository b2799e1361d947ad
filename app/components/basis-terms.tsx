'use client';
import { Popover } from '@base-ui/react/popover';
import dynamic from 'next/dynamic';
import { usePathname, useRouter, useSearchParams } from 'next/navigation';
import { useState, useTransition } from 'react';
import type { Basis, SentencePart } from '@/lib/basis';
import styles from './basis-sentence.module.css';
import { BASIS_PARAMETERS } from './links.ts';
import ui from './ui.module.css';

/** The forms and the schema behind them are only loaded when a term is touched. */
const loadEditor = () => import('./basis-editor.tsx');
const BasisEditor = dynamic(() => loadEditor().then((part) => part.BasisEditor), {
  ssr: false,
  loading: () => <p className={styles.opening}>Opening…</p>,
});

export type BasisTerm = NonNullable<SentencePart['term']> | 'units';

interface BasisTermsProps {
  parts: SentencePart[];
  basis: Basis;
  base: Basis;
  resolved: { period: [number, number] | null; yearStart: number };
}

/** The sentence with its terms as buttons, and the note of what differs from the region's own basis. */
export function BasisTerms({ parts, basis, base, resolved }: BasisTermsProps) {
  const router = useRouter();
  const path = usePathname();
  const query = useSearchParams();
  const [pending, startTransition] = useTransition();
  const changed = BASIS_PARAMETERS.some((key) => query.has(key));

  /** Puts these basis parameters into the address in place of those that are there. */
  const show = (parameters: URLSearchParams) => {
    const next = new URLSearchParams(query);
    for (const key of BASIS_PARAMETERS) next.delete(key);
    for (const [key, value] of parameters) next.set(key, value);
    const text = next.toString().replaceAll('%2C', ',');
    startTransition(() => router.push(text ? `${path}?${text}` : path, { scroll: false }));
  };

  const term = (name: BasisTerm, text: string) => (
    <Term key={name} name={name} text={text} basis={basis} base={base} resolved={resolved} onApply={show} />
  );

  return (
    <div aria-busy={pending} className={pending ? styles.pending : undefined}>
      <p className={styles.sentence}>
        {parts.map((part) => (part.term ? term(part.term, part.text) : part.text))}{' '}
        <span className={styles.small}>
          In {term('units', basis.units === 'metric' ? 'metric units' : 'US units')}.
          {changed && (
            <>
              {' '}
              These differ from the region’s own terms:{' '}
              <button type="button" className={ui.plain} onClick={() => show(new URLSearchParams())}>
                go back to those
              </button>
              .
            </>
          )}
          <span role="status" className={styles.working}>
            {pending ? ' Comparing anew…' : ''}
          </span>
        </span>
      </p>
    </div>
  );
}

interface TermProps extends Omit<BasisTermsProps, 'parts'> {
  name: BasisTerm;
  text: string;
  onApply: (parameters: URLSearchParams) => void;
}

/** One term. A span with a button's role, because a native button cannot break over two lines. */
function Term({ name, text, basis, base, resolved, onApply }: TermProps) {
  const [open, setOpen] = useState(false);
  return (
    <Popover.Root open={open} onOpenChange={setOpen}>
      <Popover.Trigger
        nativeButton={false}
        render={<span />}
        className={styles.term}
        data-term={name}
        onPointerEnter={loadEditor}
        onFocus={loadEditor}
      >
        {text}
      </Popover.Trigger>
      <Popover.Portal>
        <Popover.Positioner sideOffset={8} align="start" collisionPadding={12} className={ui.layer}>
          <Popover.Popup className={ui.popup}>
            <BasisEditor
              term={name}
              basis={basis}
              base={base}
              resolved={resolved}
              onCancel={() => setOpen(false)}
              onApply={(parameters) => {
                setOpen(false);
                onApply(parameters);
              }}
            />
          </Popover.Popup>
        </Popover.Positioner>
      </Popover.Portal>
    </Popover.Root>
  );
}
