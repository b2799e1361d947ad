import { problemResponse } from './problem';

/** A route handler that answers a problem document for whatever `answer` throws. */
export function route<Params extends Record<string, string> = Record<string, never>>(
  answer: (request: Request, params: Params) => Promise<Response>,
): (request: Request, context: { params: Promise<Params> }) => Promise<Response> {
  return async (request, context) => {
    try {
      return await answer(request, await context.params);
    } catch (error) {
      return problemResponse(error);
    }
  };
}
