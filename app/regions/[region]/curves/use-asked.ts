'use client';
import { usePathname, useRouter, useSearchParams } from 'next/navigation';
import { useOptimistic, useTransition } from 'react';
import type { Basis } from '@/lib/basis';
import type { CurveKind } from '@/lib/jobs/types';
import { chooseStations } from './choose-stations';
import { type StationChoice, writeChoice } from './curves-view';
import type { PickableStation } from './station-picker';

/** What the server is asked for, as it stands in the address. */
interface Asked {
  choice: StationChoice;
  kind: CurveKind;
  normalise: Basis['normalise'];
}

interface Answered extends Asked {
  /** what a link leaves unsaid */
  ownNormalise: Basis['normalise'];
  stations: readonly PickableStation[];
  chosen: readonly string[];
}

/** Asks the server for other curves by the address. Ticks and buttons show what was asked at once; the figure follows
 *  when the answer is there.
 *  @returns `pending` while it is not */
export function useAsked(answered: Answered) {
  const router = useRouter();
  const path = usePathname();
  const query = useSearchParams();
  const [pending, startTransition] = useTransition();
  const [asked, showAsked] = useOptimistic(
    { choice: answered.choice, kind: answered.kind, normalise: answered.normalise, chosen: answered.chosen },
    (now, change: Partial<Asked>) => ({
      ...now,
      ...change,
      chosen: change.choice ? chooseStations(answered.stations, change.choice, query.get('view')) : now.chosen,
    }),
  );
  const ask = (change: Partial<Asked>) =>
    startTransition(() => {
      showAsked(change);
      const next = new URLSearchParams(query);
      const set = (name: string, value: string | null) => (value === null ? next.delete(name) : next.set(name, value));
      if (change.choice) set('stations', writeChoice(change.choice));
      if (change.kind) set('kind', change.kind === 'period' ? null : change.kind);
      if (change.normalise) set('normalise', change.normalise === answered.ownNormalise ? null : change.normalise);
      const text = next.toString().replaceAll('%2C', ',');
      router.push(text ? `${path}?${text}` : path, { scroll: false });
    });
  return { asked, pending, ask };
}
