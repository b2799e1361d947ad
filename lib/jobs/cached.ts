import { deserialize, serialize } from 'node:v8';
import { getResult, putResult } from '../store/results.ts';

/** Bytes of results, as stored, that the process keeps at hand. */
const MEMORY_LIMIT = 64 * 2 ** 20;

interface Entry {
  value: unknown;
  size: number;
}

interface Cache {
  /** a Map keeps the order of insertion: the first entry is the least recently used one */
  entries: Map<string, Entry>;
  size: number;
  inFlight: Map<string, Promise<unknown>>;
  writes: Set<Promise<void>>;
}

const KEY = Symbol.for('hungerstone.results');
const holder = globalThis as { [KEY]?: Cache };

function cache(): Cache {
  holder[KEY] ??= { entries: new Map(), size: 0, inFlight: new Map(), writes: new Set() };
  return holder[KEY];
}

/** Answers a result from memory, else from the database, else computes it; a second asker of a result that is being
 *  computed waits for the first one's. Results are never changed by whoever gets them: they are shared.
 *
 *  Stored in V8's structured form, which keeps typed arrays and NaN.
 *  @param kind  name of the analysis, for the stored row
 *  @param key   see resultKey */
export async function cached<Value>(kind: string, key: string, compute: () => Promise<Value>): Promise<Value> {
  const { inFlight } = cache();
  const running = inFlight.get(key);
  if (running) return running as Promise<Value>;
  const kept = keptResult<Value>(kind, key);
  if (kept) return kept.value;
  const promise = computed(kind, key, compute).finally(() => inFlight.delete(key));
  inFlight.set(key, promise);
  return promise;
}

/** A result that is there already, in memory or in the database, or null. `cached` without the computing. */
export function keptResult<Value>(kind: string, key: string): { value: Value } | null {
  const { entries } = cache();
  const entry = entries.get(key);
  if (entry) {
    entries.delete(key);
    entries.set(key, entry);
    return { value: entry.value as Value };
  }
  const stored = getResult(kind, key);
  const found = stored && decoded<Value>(stored);
  if (stored && found) remember(key, found.value, stored.byteLength);
  return found;
}

async function computed<Value>(kind: string, key: string, compute: () => Promise<Value>): Promise<Value> {
  const value = await compute();
  const bytes = serialize(value);
  remember(key, value, bytes.byteLength);
  writeLater(kind, key, bytes);
  return value;
}

/** A result that this Node cannot read, because a later one wrote it, is as good as none. */
function decoded<Value>(stored: Uint8Array): { value: Value } | null {
  try {
    return { value: deserialize(stored) as Value };
  } catch {
    return null;
  }
}

function remember(key: string, value: unknown, size: number): void {
  const held = cache();
  if (size > MEMORY_LIMIT) return;
  held.entries.set(key, { value, size });
  held.size += size;
  for (const [oldest, entry] of held.entries) {
    if (held.size <= MEMORY_LIMIT) break;
    held.entries.delete(oldest);
    held.size -= entry.size;
  }
}

/** Stores a result after the answer has gone out. One that cannot be stored is only computed again some day. */
function writeLater(kind: string, key: string, bytes: Uint8Array): void {
  const write = new Promise<void>((resolve) => setImmediate(resolve))
    .then(() => putResult(kind, key, bytes))
    .then(
      () => undefined,
      () => undefined,
    )
    .finally(() => cache().writes.delete(write));
  cache().writes.add(write);
}

/** Waits until every result is stored; for the end of a batch command. */
export async function settleResults(): Promise<void> {
  await Promise.all(cache().writes);
}

/** Forgets what the process has at hand; what is stored stays. */
export async function forgetResults(): Promise<void> {
  await settleResults();
  holder[KEY] = undefined;
}
