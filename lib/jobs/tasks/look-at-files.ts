import type { KnownStation } from '../../intake/types.ts';
import { type FileLook, type Looked, lookAtFile } from '../look-at-file.ts';
import { kindOf } from '../stage-file.ts';

/** Looks at files one after the other, in a worker, so that a heavy one keeps nobody else waiting. Registries come first:
 *  the stations that they name are known to the flows beside them.
 *  @param known  the stations that flows may name besides; null where flows make them
 *  @returns      in the order given */
export async function lookAtFiles({
  looks,
  known,
}: {
  looks: Omit<FileLook, 'known'>[];
  known: KnownStation[] | null;
}): Promise<Looked[]> {
  const kinds = await Promise.all(
    looks.map(({ file, choices, broken }) => (broken ? 'flows' : kindOf(file, { files: { [file.name]: choices } }))),
  );
  const order = looks.map((_, at) => at).sort((a, b) => rank(kinds[a]) - rank(kinds[b]) || a - b);
  const out: Looked[] = new Array(looks.length);
  let named = known;
  for (const at of order) {
    out[at] = await lookAtFile({ ...looks[at], known: named });
    if (out[at].names) named = [...(named ?? []), ...out[at].names];
  }
  return out;
}

const rank = (kind: string): number => (kind === 'registry' ? 0 : 1);
