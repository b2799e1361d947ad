const GIB = 2 ** 30;
const DEFAULT_LIMIT = 4 * GIB;

/** Largest upload taken, and the most that archives may unpack to, bytes; HUNGERSTONE_MAX_UPLOAD sets another. */
export function uploadLimit(): number {
  const set = Number(process.env.HUNGERSTONE_MAX_UPLOAD);
  return Number.isFinite(set) && set > 0 ? set : DEFAULT_LIMIT;
}
