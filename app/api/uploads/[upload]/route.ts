import { jsonAnswer } from '@/app/api/_http/answer';
import { readJson, readParameters } from '@/app/api/_http/parameters';
import { route } from '@/app/api/_http/route';
import { idleSessionOf, present, type UploadParams } from '@/app/api/_http/session';
import { viewUpload } from '@/lib/jobs/open-upload';
import { discardSession } from '@/lib/jobs/upload-session';
import { inShort } from '@/lib/jobs/upload-types';
import { leftOut, lookedAt } from '../look';
import { uploadChange } from './bodies';

/** An upload that waits: its files in short, and its last import. */
export const GET = route<UploadParams>(async (request, { upload }) => {
  readParameters(request, {});
  return jsonAnswer(present(await viewUpload(upload)));
});

/** Says how some of its files are to be read, and which stay out; answers what the former look like then. */
export const PATCH = route<UploadParams>(async (request, params) => {
  const { id } = await idleSessionOf(params);
  const { files, leaveOut } = await readJson(request, uploadChange);
  if (leaveOut) await leftOut(id, leaveOut);
  return jsonAnswer((await lookedAt(id, files)).map(inShort));
});

/** Gives an upload up: its files go. */
export const DELETE = route<UploadParams>(async (_request, params) => {
  const { id } = await idleSessionOf(params);
  await discardSession(id);
  return new Response(null, { status: 204 });
});
