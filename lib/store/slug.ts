/** The name of a region as addresses carry it: letters and digits in lower case, everything else one hyphen.
 *  Example: "Upper Wethe & Lauch" → "upper-wethe-lauch" */
export function slugOf(name: string): string {
  const slug = name
    .normalize('NFKD')
    .replace(/\p{M}/gu, '')
    .replace(/ß/g, 'ss')
    .toLowerCase()
    .replace(/[^\p{L}\p{N}]+/gu, '-')
    .replace(/^-+|-+$/g, '');
  return slug === '' ? 'region' : slug;
}
