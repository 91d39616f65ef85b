/**
 * Writes the project's own files from a state's rows, rows in natural order, numbers in their shortest exact form,
 * so that importing an export and exporting it again gives the same bytes. CSV follows RFC 4180 (CRLF line ends).
 */
import type { Geometry } from 'geojson';
import type { Block, Direction, Feature, Rotation } from '../ledger/contract';
import { DIRECTION_COLUMNS } from './rules/directions';
import { ROTATION_COLUMNS } from './rules/rotations';

type Cell = string | number | null | undefined;
export type GeometryOf = (sha256: string) => Geometry;

export function csvCell(value: Cell): string {
  if (value === null || value === undefined) return '';
  if (typeof value === 'number') return String(value);
  return /[",\r\n]|^\s|\s$/.test(value) ? `"${value.replaceAll('"', '""')}"` : value;
}

export function csvTable(headings: readonly string[], rows: readonly (readonly Cell[])[]): string {
  return [headings, ...rows].map((row) => row.map(csvCell).join(',')).join('\r\n') + '\r\n';
}

const XYZ = ['cov_xx', 'cov_xy', 'cov_xz', 'cov_yy', 'cov_yz', 'cov_zz'];

export function rotationsCsv(rotations: readonly Rotation[]): string {
  const rows = rotations.map((row) =>
    ROTATION_COLUMNS.map((column): Cell => {
      const entry = XYZ.indexOf(column);
      return entry >= 0 ? row.covariance?.[entry] : (row[column as keyof Rotation] as Cell);
    }),
  );
  return csvTable(ROTATION_COLUMNS, rows);
}

export function directionsCsv(directions: readonly Direction[]): string {
  return csvTable(
    DIRECTION_COLUMNS,
    directions.map((row) => DIRECTION_COLUMNS.map((column) => row[column])),
  );
}

/** One feature a line, so that a text comparison of two exports shows which block changed. */
function featureCollection(features: readonly { properties: object; geometry: Geometry | null }[]): string {
  const lines = features.map((f) => JSON.stringify({ type: 'Feature', ...f }));
  return `{"type":"FeatureCollection","features":[\n${lines.join(',\n')}\n]}\n`;
}

export function blocksGeojson(blocks: readonly Block[], geometryOf: GeometryOf): string {
  const features = blocks.flatMap((block) => {
    const { code, name, kind, appears_ma, disappears_ma, evidence, source, note } = block;
    const whole = {
      outline_older_ma: null,
      outline_younger_ma: null,
      inside: null,
      sha256: null,
      source: null,
    };
    const outlines = block.outlines.length > 0 ? block.outlines : [whole];
    return outlines.map(({ outline_older_ma, outline_younger_ma, inside, sha256, source: drawn_from }) => ({
      properties: {
        code, name, kind, appears_ma, disappears_ma, outline_older_ma, outline_younger_ma, inside, evidence, source, note,
        ...(drawn_from === null ? {} : { outline_source: drawn_from }),
      }, // prettier-ignore
      geometry: sha256 === null ? null : geometryOf(sha256),
    }));
  });
  return featureCollection(features);
}

export function featuresGeojson(features: readonly Feature[], geometryOf: GeometryOf): string {
  return featureCollection(
    features.map(
      ({ block, kind, name, age_ma, appears_ma, disappears_ma, chron, side, source, note, sha256 }) => ({
        properties: { block, kind, name, age_ma, appears_ma, disappears_ma, chron, side, source, note },
        geometry: geometryOf(sha256),
      }),
    ),
  );
}
