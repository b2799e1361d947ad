/** Space about the figures of a station page, in pixels, the same for all so that their years stand under one another. */
export const PLOT = { left: 58, right: 14, top: 14, bottom: 30 };
