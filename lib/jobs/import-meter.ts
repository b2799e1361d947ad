import type { ImportProgress } from './import-types.ts';

/** Reading is this share of an import, storing the rest. */
const READING_SHARE = 0.9;
/** Progress is told at most this often, milliseconds. */
export const TELL_EVERY_MS = 100;

/** The time left is told when so much is done, and after so many seconds: before, it would only jump. */
const TELLING_SHARE = 0.02;
const TELLING_SECONDS = 1;

export const NO_PROGRESS: ImportProgress = {
  stage: 'waiting',
  file: null,
  fileNumber: 0,
  files: 0,
  rows: 0,
  bytes: 0,
  totalBytes: 0,
  share: 0,
  rowsPerSecond: 0,
  secondsLeft: null,
};

/** Keeps count of an import over all of its files and tells how far it is. */
export class ImportMeter {
  private progress: ImportProgress;
  private rowsBefore = 0;
  private bytesBefore = 0;
  private told = Number.NEGATIVE_INFINITY;
  private readonly begun = performance.now();

  constructor(
    private readonly sizes: readonly number[],
    private readonly tell: (progress: ImportProgress) => void,
  ) {
    const totalBytes = sizes.reduce((sum, size) => sum + size, 0);
    this.progress = { ...NO_PROGRESS, stage: 'recognising', files: sizes.length, totalBytes };
    this.update({}, true);
  }

  /** A file begins. @param index  its place among the files given */
  begin(file: string, fileNumber: number): void {
    this.update({ stage: 'reading', file, fileNumber }, true);
  }

  /** So many rows and bytes of the file at hand are read. */
  read(rows: number, bytes: number): void {
    const allRows = this.rowsBefore + rows;
    const allBytes = this.bytesBefore + bytes;
    const seconds = this.seconds();
    this.update({
      rows: allRows,
      bytes: allBytes,
      share: this.progress.totalBytes > 0 ? (READING_SHARE * allBytes) / this.progress.totalBytes : 0,
      rowsPerSecond: seconds > 0 ? Math.round(allRows / seconds) : 0,
    });
  }

  /** The file at hand is read. */
  end(index: number, rows: number): void {
    this.rowsBefore += rows;
    this.bytesBefore += this.sizes[index];
    this.read(0, 0);
  }

  /** All files are read, and so much of them, 0 to 1, is stored. */
  store(share: number): void {
    this.update({ stage: 'storing', file: null, share: READING_SHARE + (1 - READING_SHARE) * share });
  }

  done(): void {
    this.update({ stage: 'done', share: 1 }, true);
  }

  private seconds(): number {
    return (performance.now() - this.begun) / 1000;
  }

  private secondsLeft(): number | null {
    const { share, stage } = this.progress;
    const seconds = this.seconds();
    if (stage === 'done') return 0;
    if (share < TELLING_SHARE || seconds < TELLING_SECONDS) return null;
    return Math.max(1, Math.round((seconds / share) * (1 - share)));
  }

  private update(change: Partial<ImportProgress>, now = false): void {
    this.progress = { ...this.progress, ...change };
    this.progress.secondsLeft = this.secondsLeft();
    if (!now && performance.now() - this.told < TELL_EVERY_MS) return;
    this.told = performance.now();
    this.tell(this.progress);
  }
}
