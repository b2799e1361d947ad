/** How a request that changes a station went. */
export type SaveResult = { ok: true } | { ok: false; changedMeanwhile: boolean; detail: string };

/** Sends a change of a station; answers in words what kept it from being stored. */
export async function sendStation(
  path: string,
  method: 'PATCH' | 'POST' | 'DELETE',
  body: unknown,
  edition: string | null = null,
): Promise<SaveResult> {
  try {
    const response = await fetch(path, {
      method,
      headers: { 'content-type': 'application/json', ...(edition === null ? {} : { 'if-match': `"${edition}"` }) },
      body: body === undefined ? undefined : JSON.stringify(body),
    });
    if (response.ok) return { ok: true };
    const { detail = 'The server did not say why.' } = (await response.json()) as { detail?: string };
    return { ok: false, changedMeanwhile: response.status === 412, detail };
  } catch (error) {
    const reason = error instanceof Error ? error.message : String(error);
    return { ok: false, changedMeanwhile: false, detail: `The server cannot be reached (${reason}).` };
  }
}
