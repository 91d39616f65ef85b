/**
 * The rows that were not taken, as a file of the same kind: mended, it is imported as it stands. What is wrong with each
 * stands beside it under `problem` and `hint`, which are not read.
 */
import type { RejectedRow } from '../contract';
import { csvTable } from '../exports';
import type { ImportKind } from '../files';
import { featureLines } from './geojson-text';
import { readRecords } from './table';

export function rejectedFile(kind: ImportKind, text: string, rows: readonly RejectedRow[]): string {
  return kind === 'blocks' || kind === 'features' ? rejectedFeatures(text, rows) : rejectedTable(text, rows);
}

/** How many rows of the file have something wrong; one may have several faults. */
export const countRows = (rows: readonly RejectedRow[]): number =>
  new Set(rows.map(({ line, entry }, i) => (entry ? `entry ${entry}` : line === null ? `row ${i}` : line)))
    .size;

const words = (faults: readonly RejectedRow[], which: 'problem' | 'hint'): string =>
  faults
    .map((fault) => (which === 'hint' || !fault.column ? fault[which] : `${fault.column}: ${fault.problem}`))
    .join('; ');

function rejectedTable(text: string, rows: readonly RejectedRow[]): string {
  const [heading, ...rest] = readRecords(text);
  const byLine = new Map<number | null, RejectedRow[]>();
  for (const row of rows) byLine.set(row.line, [...(byLine.get(row.line) ?? []), row]);
  const wide = Math.max(heading?.cells.length ?? 0, ...rest.map(({ cells }) => cells.length));
  const filled = (record: readonly string[]): string[] => [
    ...record,
    ...Array<string>(wide - record.length).fill(''),
  ];
  const kept = rest.flatMap(({ cells, line }) => {
    const faults = byLine.get(line);
    return faults ? [[...filled(cells), words(faults, 'problem'), words(faults, 'hint')]] : [];
  });
  return csvTable([...filled(heading?.cells ?? []), 'problem', 'hint'], kept);
}

function rejectedFeatures(text: string, rows: readonly RejectedRow[]): string {
  const { features } = JSON.parse(text) as { features: { properties?: object | null }[] };
  const lines = featureLines(text);
  const kept = features.flatMap((feature, i) => {
    const faults = rows.filter(({ line, entry }) => (entry ? entry === i + 1 : line === lines[i]));
    if (faults.length === 0) return [];
    const properties = {
      ...feature.properties,
      problem: words(faults, 'problem'),
      hint: words(faults, 'hint'),
    };
    return [JSON.stringify({ ...feature, properties })];
  });
  return `{"type":"FeatureCollection","features":[\n${kept.join(',\n')}\n]}\n`;
}
