import { jsonAnswer } from '@/app/api/_http/answer';
import { readJson } from '@/app/api/_http/parameters';
import { route } from '@/app/api/_http/route';
import { idleSessionOf, type UploadParams } from '@/app/api/_http/session';
import { lookedAt } from '../../look';
import { previewOrder } from '../bodies';

/** One file as it is understood under the choices given. */
export const POST = route<UploadParams>(async (request, params) => {
  const { id } = await idleSessionOf(params);
  const { file, choices } = await readJson(request, previewOrder);
  const [preview] = await lookedAt(id, { [file]: choices });
  return jsonAnswer(preview);
});
