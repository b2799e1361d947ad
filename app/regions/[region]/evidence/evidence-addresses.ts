import { apiHref, BASIS_PARAMETERS } from '@/app/components/links';
import type { ChanceMethod } from '@/lib/region/regional-types';

interface Asked {
  chance: ChanceMethod;
  area: string | null;
  breaks: string | null;
}

/** Where the page's answers are asked for: each as JSON for the screen, or in another format for a file. */
export function evidenceAddresses(slug: string, query: string, { chance, area, breaks }: Asked) {
  const table = (name: string, more: Record<string, string | null>) => (format?: string) => {
    const [path, basis] = apiHref(slug, name, query).split('?');
    const parameters = new URLSearchParams(basis);
    for (const [key, value] of Object.entries({ ...more, format: format ?? null })) {
      if (value !== null) parameters.set(key, value);
    }
    const text = parameters.toString().replaceAll('%2C', ',').replaceAll('%3B', ';');
    return text ? `${path}?${text}` : path;
  };
  return {
    regional: table('regional', { method: chance === 'permutation' ? null : chance, area }),
    windows: table('start-end', {}),
    breaks: table('breaks', { breaks }),
    alternatives: table('alternatives', {}),
    /** the ranking on the terms at hand against the one with some keys changed */
    movement: (change: Readonly<Record<string, string>>) =>
      table('movement', { against: termsWith(query, change).toString() })(),
  };
}

/** The basis keys of an address with some changed. */
function termsWith(query: string, change: Readonly<Record<string, string>>): URLSearchParams {
  const from = new URLSearchParams(query);
  const terms = new URLSearchParams();
  for (const key of BASIS_PARAMETERS) {
    const value = change[key] ?? from.get(key);
    if (value !== null && value !== undefined) terms.set(key, value);
  }
  return terms;
}
