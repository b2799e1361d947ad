import type { UploadView } from '@/lib/jobs/upload-types';

/** An upload that waits for its import, in short. */
export interface Waiting {
  id: string;
  /** ISO date and time */
  createdAt: string;
  files: number;
  /** name of its first file */
  first: string;
}

export const waitingOf = ({ id, createdAt, files }: UploadView): Waiting => ({
  ...{ id, createdAt, files: files.length, first: files[0]?.file ?? 'no file' },
});
