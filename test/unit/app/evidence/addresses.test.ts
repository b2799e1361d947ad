import { expect, test } from 'vitest';
import { evidenceAddresses } from '@/app/regions/[region]/evidence/evidence-addresses';

const ASKED = { chance: 'permutation', area: null, breaks: null } as const;

test('evidenceAddresses: the basis goes along, what is asked by default and what belongs to the screen do not', () => {
  const to = evidenceAddresses('upper-alder', 'days=30&years=significant&view=x', ASKED);
  expect(to.regional()).toBe('/api/regions/upper-alder/regional?days=30');
  expect(to.windows('csv')).toBe('/api/regions/upper-alder/start-end?days=30&format=csv');
});

test('evidenceAddresses: the method, the drawn area and the breaks', () => {
  const to = evidenceAddresses('r', '', { chance: 'sieve', area: '7.5,47;8,47;8,47.25', breaks: '1990,2005' });
  expect(to.regional('csv')).toBe('/api/regions/r/regional?method=sieve&area=7.5,47;8,47;8,47.25&format=csv');
  expect(to.breaks()).toBe('/api/regions/r/breaks?breaks=1990,2005');
});

test('evidenceAddresses: movement is asked against the terms at hand with some changed', () => {
  const address = evidenceAddresses('r', 'days=30&alpha=0.05', ASKED).movement({ days: '7', season: '5-10' });
  const query = new URL(address, 'http://x').searchParams;
  expect(query.get('days')).toBe('30');
  expect(query.get('against')).toBe('season=5-10&days=7&alpha=0.05');
});
