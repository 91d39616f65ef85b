/** The files that come in and go out; free of schemas, so that pages in the browser stay light. */

/** What a file can hold; the names are those of the files of the project's own formats. */
export const IMPORT_KINDS = ['blocks', 'rotations', 'features', 'directions'] as const;
export type ImportKind = (typeof IMPORT_KINDS)[number];

export const EXPORT_NAMES = [
  'blocks.geojson',
  'rotations.csv',
  'features.geojson',
  'directions.csv',
] as const;
export type ExportName = (typeof EXPORT_NAMES)[number];

/** The largest file that one import reads. */
export const IMPORT_LIMIT_BYTES = 64 * 1024 * 1024;
