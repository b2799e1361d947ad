/** A heading in plain words: "Drainage_Area (km²)" → "drainage area km2" */
export function plainHeading(heading: string): string {
  return heading
    .replace(/(\p{Ll})(\p{Lu})/gu, '$1 $2')
    .toLowerCase()
    .replaceAll('²', '2')
    .replaceAll('³', '3')
    .replaceAll('^', '')
    .replace(/[^\p{L}\p{N}]+/gu, ' ')
    .trim();
}
