import { addToSession } from '@/app/api/_http/receive-session';
import { route } from '@/app/api/_http/route';
import { idleSessionOf, type UploadParams } from '@/app/api/_http/session';

/** Adds files to an upload that waits. */
export const POST = route<UploadParams>(async (request, params) => addToSession(request, await idleSessionOf(params)));
