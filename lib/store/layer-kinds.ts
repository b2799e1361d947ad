/** What a map layer shows. Apart from the queries, for workers that read layers and want no Prisma. */
export const LAYER_KINDS = ['river', 'catchment', 'other'] as const;
export type LayerKind = (typeof LAYER_KINDS)[number];
