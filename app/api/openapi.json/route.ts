import { jsonAnswer } from '@/app/api/_http/answer';
import { route } from '@/app/api/_http/route';
import { openApiDocument } from './document';

export const dynamic = 'force-dynamic';

/** The description of this API. */
export const GET = route(async () => jsonAnswer(openApiDocument()));
