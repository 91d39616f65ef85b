/** What a time-slice map can be told to draw and on what paper; free of schemas, so that pages in the browser stay light. */
export const LAYERS = ['graticule', 'coasts', 'names', 'velocity', 'path', 'ellipse'] as const;
export type Layer = (typeof LAYERS)[number];
export const USUAL_LAYERS: readonly Layer[] = ['graticule', 'coasts', 'names', 'path', 'ellipse'];

/** Paper sizes in millimetres, long side first (ISO 216). */
export const PAPERS = { a3: [420, 297], a4: [297, 210], a5: [210, 148] } as const;
export type Paper = keyof typeof PAPERS;

/** Characters of a title and of a caption. */
export const MOST_TITLE = 160;
export const MOST_CAPTION = 600;
