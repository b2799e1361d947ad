/** Sends files to an import, with progress. XMLHttpRequest, because fetch does not tell how far an upload is. */
import type { ImportChoices } from '@/lib/jobs/import-types';

export interface UploadHandle {
  /** id of the job that reads the files */
  job: Promise<string>;
  cancel(): void;
}

/** What the server said instead of taking the files, or that it could not be reached. */
export class UploadError extends Error {
  override name = 'UploadError';
}

/** The person took the upload back. */
export class UploadCancelled extends Error {
  override name = 'UploadCancelled';
}

/** @param onProgress  bytes sent and bytes in all, several times a second */
export function upload(
  slug: string,
  files: readonly File[],
  choices: ImportChoices,
  onProgress: (sent: number, total: number) => void,
): UploadHandle {
  const request = new XMLHttpRequest();
  const job = new Promise<string>((resolve, reject) => {
    const form = new FormData();
    // the choices go first: the server reads the parts in order
    form.append('choices', JSON.stringify(choices));
    for (const file of files) form.append('file', file, file.name);
    request.upload.onprogress = (event) => onProgress(event.loaded, event.total);
    request.onerror = () => reject(new UploadError('The server could not be reached. Nothing was changed; try again.'));
    request.onabort = () => reject(new UploadCancelled('cancelled'));
    request.onload = () => {
      const answer = readAnswer(request.responseText);
      if (request.status === 202 && answer.id) resolve(answer.id);
      else reject(new UploadError(answer.detail ?? `The server answered ${request.status} and took nothing.`));
    };
    request.open('POST', `/api/regions/${encodeURIComponent(slug)}/imports`);
    request.send(form);
  });
  return { job, cancel: () => request.abort() };
}

function readAnswer(text: string): { id?: string; detail?: string } {
  try {
    const { id, job, detail } = JSON.parse(text) as { id?: string; job?: { id?: string }; detail?: string };
    return { id: id ?? job?.id, detail };
  } catch {
    return {};
  }
}

/** Makes a region and answers its slug.
 *  @throws UploadError with the server's reason, for example a name that is taken */
export async function createRegion(name: string): Promise<string> {
  const response = await fetch('/api/regions', {
    method: 'POST',
    headers: { 'content-type': 'application/json' },
    body: JSON.stringify({ name }),
  }).catch(() => null);
  if (!response) throw new UploadError('The server could not be reached. Nothing was changed; try again.');
  const answer = (await response.json().catch(() => ({}))) as { slug?: string; detail?: string };
  if (!response.ok || !answer.slug) {
    throw new UploadError(answer.detail ?? `The region could not be made (the server answered ${response.status}).`);
  }
  return answer.slug;
}
