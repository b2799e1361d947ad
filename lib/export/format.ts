/** The forms in which tables leave the program. */
export const FORMATS = ['csv', 'json', 'geojson'] as const;
export type Format = (typeof FORMATS)[number];
