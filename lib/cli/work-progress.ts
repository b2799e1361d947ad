import type { LaneProgress, WorkContext } from '../jobs/lanes.ts';

/** Tells on stderr how far long work is: one line that renews itself on a terminal, else a line for each stage.
 *  @param words  what each stage does. Example: { chance: 'Trying chance' }
 *  @returns      the context to work in, and what clears the line at the end */
export function workProgress(words: Readonly<Record<string, string>>): { context: WorkContext; end(): void } {
  const { stderr } = process;
  let said = '';
  const onProgress = ({ stage, share }: LaneProgress) => {
    const what = words[stage] ?? stage;
    if (stderr.isTTY) stderr.write(`\r\u001b[K${what}: ${Math.round(share * 100)} %`);
    else if (what !== said) stderr.write(`${what} …\n`);
    said = what;
  };
  return {
    context: { onProgress },
    end: () => {
      if (stderr.isTTY && said !== '') stderr.write('\r\u001b[K');
    },
  };
}
