import type { LongWork } from '@/lib/jobs/long-work';
import { longAnswer, waitParameter } from './long-answer';
import { plainFormatParameter, plainTableAnswer } from './plain-table';

/** Parameters of every route that answers by `longTableAnswer`. */
export const longTableParameters = { ...plainFormatParameter, ...waitParameter };

interface LongTable<Value> extends LongWork<Value> {
  /** ranked stations that the work goes over */
  stations: number;
  format: 'csv' | 'json' | 'metadata';
  wait: 'true' | 'false';
  /** name of the CSV file */
  file: string;
  product: (format: 'csv' | 'json', value: Value) => string;
  metadata: () => Record<string, unknown>;
}

/** Answers work that may take long as a table whose rows are no places. A file is wanted whole, so that its asker waits;
 *  what its columns mean is known before any work.
 *  @throws as `longAnswer` */
export function longTableAnswer<Value>(
  request: Request,
  { stations, format, wait, file, product, metadata, ...work }: LongTable<Value>,
): Response | Promise<Response> {
  const table = { key: work.key, format, file, metadata };
  if (format === 'metadata') return plainTableAnswer(request, { ...table, product: () => '' });
  return longAnswer({ ...work, stations, wait: wait === 'true' || format === 'csv' }, (value) =>
    plainTableAnswer(request, { ...table, product: (as) => product(as, value) }),
  );
}
