import { openSession } from '@/app/api/_http/receive-session';
import { route } from '@/app/api/_http/route';

/** Receives files for a region that their import will make: whoever gives up leaves nothing behind. */
export const POST = route(async (request) => openSession(request, null));
