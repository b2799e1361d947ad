import type { ImportProgress } from '../jobs/import-types.ts';
import { followJob } from '../jobs/live-jobs.ts';

/** Tells on stderr how far an import is: one line that renews itself on a terminal, else a line for each file. */
export async function followImport(jobId: string, signal: AbortSignal): Promise<void> {
  const { stderr } = process;
  let said = '';
  for await (const { progress } of followJob(jobId, signal)) {
    const { stage, file, fileNumber, files, share, rowsPerSecond, secondsLeft } = progress as ImportProgress;
    if (stage === 'waiting' || stage === 'recognising' || stage === 'done') continue;
    const what =
      stage === 'reading'
        ? `Reading ${file} (${fileNumber} of ${files})`
        : stage === 'checking'
          ? 'Checking the records'
          : 'Storing';
    if (stderr.isTTY) {
      const rate = stage === 'reading' ? `, ${rowsPerSecond.toLocaleString('en')} rows/s` : '';
      stderr.write(`\r\u001b[K${what}: ${Math.round(share * 100)} %${rate}${timeLeft(secondsLeft)}`);
    } else if (what !== said) stderr.write(`${what} …\n`);
    said = what;
  }
  if (stderr.isTTY && said !== '') stderr.write('\r\u001b[K');
}

/** Example: timeLeft(135) → ", 2 min 15 s left" */
function timeLeft(seconds: number | null): string {
  if (seconds === null) return '';
  const minutes = Math.floor(seconds / 60);
  return `, ${minutes > 0 ? `${minutes} min ` : ''}${seconds % 60} s left`;
}
