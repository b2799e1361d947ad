/** What the import screen asks of the server. Files are sent by XMLHttpRequest, because fetch does not tell how far it is. */
import type { FileChoices, ImportChoices } from '@/lib/jobs/import-types';
import type { FilePreview, UploadedFile, UploadView } from '@/lib/jobs/upload-types';

/** What the server said instead of doing what was asked, or that it could not be reached. */
export class RequestError extends Error {
  override name = 'RequestError';
}

/** The person took the upload back. */
export class UploadCancelled extends Error {
  override name = 'UploadCancelled';
}

const UNREACHABLE = 'The server could not be reached. Nothing was changed; try again.';

export interface Sending {
  upload: Promise<UploadView>;
  cancel(): void;
}

/** Sends files to be looked at.
 *  @param onProgress  bytes sent and bytes in all, several times a second */
export function sendFiles(
  address: string,
  files: readonly File[],
  onProgress: (sent: number, total: number) => void,
): Sending {
  const request = new XMLHttpRequest();
  const upload = new Promise<UploadView>((resolve, reject) => {
    const form = new FormData();
    for (const file of files) form.append('file', file, file.name);
    request.upload.onprogress = (event) => onProgress(event.loaded, event.total);
    request.onerror = () => reject(new RequestError(UNREACHABLE));
    request.onabort = () => reject(new UploadCancelled('cancelled'));
    request.onload = () => {
      const answer = jsonIn(request.responseText) as UploadView & { detail?: string };
      if (request.status < 300) resolve(answer);
      else reject(new RequestError(answer.detail ?? `The server answered ${request.status} and took nothing.`));
    };
    request.open('POST', address);
    request.send(form);
  });
  return { upload, cancel: () => request.abort() };
}

function jsonIn(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return {};
  }
}

/** Asks for JSON.
 *  @throws RequestError with the server's reason; the signal's reason when aborted */
async function ask<Answer>(address: string, init: RequestInit = {}): Promise<Answer> {
  const response = await fetch(address, { cache: 'no-store', ...init }).catch((error: unknown) => {
    if (init.signal?.aborted) throw error;
    throw new RequestError(UNREACHABLE);
  });
  const answer = jsonIn(await response.text()) as Answer & { detail?: string };
  if (!response.ok) throw new RequestError(answer.detail ?? `The server answered ${response.status}.`);
  return answer;
}

const body = (method: string, value: unknown, signal?: AbortSignal): RequestInit => ({
  ...{ method, signal, body: JSON.stringify(value) },
  headers: { 'content-type': 'application/json' },
});

/** Where uploads for a region, or for one to be made, are sent. */
export const uploadsAddress = (region: string | null): string =>
  region === null ? '/api/uploads' : `/api/regions/${encodeURIComponent(region)}/uploads`;

const uploadAddress = (id: string, rest = '') => `/api/uploads/${encodeURIComponent(id)}${rest}`;
export const moreFilesAddress = (id: string): string => uploadAddress(id, '/files');

export const fetchUpload = (id: string): Promise<UploadView> => ask(uploadAddress(id));

export const discardUpload = (id: string): Promise<unknown> => ask(uploadAddress(id), { method: 'DELETE' });

export const lookAtFiles = (id: string, files: Record<string, FileChoices>): Promise<UploadedFile[]> =>
  ask(uploadAddress(id), body('PATCH', { files }));

/** Says which files of an upload are to stay out of its import. */
export const leaveOut = (id: string, files: readonly string[]): Promise<unknown> =>
  ask(uploadAddress(id), body('PATCH', { leaveOut: files }));

export const lookAtFile = (
  id: string,
  file: string,
  choices: FileChoices,
  signal?: AbortSignal,
): Promise<FilePreview> => ask(uploadAddress(id, '/preview'), body('POST', { file, choices }, signal));

export interface ImportOrder {
  choices: ImportChoices;
  leaveOut: readonly string[];
  dryRun: boolean;
  region?: { name: string };
}

/** Starts an import, or a trial of one. @returns the job's id */
export async function startImport(id: string, order: ImportOrder): Promise<string> {
  return (await ask<{ id: string }>(uploadAddress(id, '/import'), body('POST', order))).id;
}

export const cancelJob = (id: string): Promise<unknown> =>
  ask(`/api/jobs/${encodeURIComponent(id)}`, { method: 'DELETE' });

/** A mapping kept under a name, to use again. */
export interface SavedMapping {
  id: number;
  name: string;
  mapping: FileChoices['mapping'];
}

const mappingsAddress = (region: string) => `/api/regions/${encodeURIComponent(region)}/mappings`;

export const fetchMappings = (region: string): Promise<SavedMapping[]> => ask(mappingsAddress(region));

export const saveMapping = (region: string, saved: Omit<SavedMapping, 'id'>): Promise<SavedMapping> =>
  ask(mappingsAddress(region), body('POST', saved));

export const removeMapping = (region: string, id: number): Promise<unknown> =>
  ask(`${mappingsAddress(region)}/${id}`, { method: 'DELETE' });
