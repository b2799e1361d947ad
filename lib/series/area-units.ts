/** Units in which a drainage area is given, in the order offered. */
export const AREA_UNITS = ['km²', 'mi²', 'ha', 'acres'] as const;
export type AreaUnit = (typeof AREA_UNITS)[number];

/** km² in one unit, exact by definition: a mile is 1,609.344 m, an acre 4,046.8564224 m² (NIST SP 811, 2008). */
export const KM2_OF: Record<AreaUnit, number> = { 'km²': 1, 'mi²': 2.589988110336, ha: 0.01, acres: 0.0040468564224 };

/** km² in one m². */
export const KM2_OF_M2 = 1e-6;
