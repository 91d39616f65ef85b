/** Reads the text of a GeoJSON FeatureCollection and remembers the line on which each feature starts. */
import type { Geometry } from 'geojson';
import type { RejectedRow } from '../contract';

export interface LocatedFeature {
  readonly line: number;
  readonly index: number;
  readonly properties: Readonly<Record<string, unknown>>;
  readonly geometry: Geometry | null;
}

export interface GeoJsonReading {
  readonly features: readonly LocatedFeature[];
  readonly rejected: readonly RejectedRow[];
}

const wrongFile = (line: number | null, read: string, problem: string, hint: string): GeoJsonReading => ({
  features: [],
  rejected: [{ line, column: null, read, problem, hint }],
});

export function readFeatureCollection(text: string): GeoJsonReading {
  let data: unknown;
  try {
    data = JSON.parse(text);
  } catch (error) {
    const position = faultAt(text, error);
    const line = lineAt(text, position);
    const read = text.slice(Math.max(0, position - 20), position + 20);
    return wrongFile(
      line,
      read,
      'not JSON',
      'A comma too many or a missing bracket? Save the file as GeoJSON again.',
    );
  }
  const collection = data as { type?: unknown; features?: unknown };
  if (collection?.type !== 'FeatureCollection' || !Array.isArray(collection.features)) {
    const read = written(collection?.type ?? typeof data);
    return wrongFile(
      1,
      read,
      'not a FeatureCollection',
      'Wrap the features as {"type":"FeatureCollection","features":[…]}.',
    );
  }
  const lines = featureLines(text);
  const rejected: RejectedRow[] = [];
  const features: LocatedFeature[] = [];
  collection.features.forEach((feature: unknown, index) => {
    const line = lines[index] ?? 1;
    const f = feature as { type?: unknown; properties?: unknown; geometry?: unknown } | null;
    if (f?.type !== 'Feature') {
      const hint = 'Each entry has "type":"Feature", properties and a geometry.';
      rejected.push({
        line,
        entry: index + 1,
        column: null,
        read: written(f?.type),
        problem: `entry ${index + 1} is not a Feature`,
        hint,
      });
      return;
    }
    features.push({
      line,
      index,
      properties: (f.properties ?? {}) as Record<string, unknown>,
      geometry: (f.geometry ?? null) as Geometry | null,
    });
  });
  return { features, rejected };
}

/** Names the properties that no column of the format claims. */
export function unreadProperties(features: readonly LocatedFeature[], known: ReadonlySet<string>): string[] {
  const unread = new Set(
    features.flatMap(({ properties }) => Object.keys(properties)).filter((key) => !known.has(key)),
  );
  return unread.size > 0 ? [`Properties not read: ${[...unread].join(', ')}.`] : [];
}

/** Whatever stands there, as a few words; converting an object could run what it holds. */
const written = (value: unknown): string =>
  typeof value === 'object' ? 'an object' : String(value).slice(0, 80);

/** Where JSON stops to be JSON: the engine names the place or quotes what stands around it, or the text ends too soon. */
function faultAt(text: string, error: unknown): number {
  const words = String(error);
  const place = /position (\d+)/.exec(words)?.[1];
  if (place !== undefined) return Number(place);
  const around = /, (?:\.\.\.)?"([\s\S]+)"(?:\.\.\.)? is not valid JSON$/.exec(words)?.[1];
  const found = around === undefined ? -1 : text.indexOf(around);
  return found < 0 ? text.length : found + Math.floor(around!.length / 2);
}

function lineAt(text: string, position: number): number {
  let line = 1;
  for (let i = 0; i < position && i < text.length; i++) if (text.charCodeAt(i) === 10) line++;
  return line;
}

/** Line of the opening brace of each entry of the top-level "features" array; a scan, since JSON.parse drops places. */
export function featureLines(text: string): number[] {
  const lines: number[] = [];
  let line = 1;
  let depth = 0;
  let listDepth = -1;
  for (let i = 0; i < text.length; i++) {
    const c = text[i];
    if (c === '\n') line++;
    else if (c === '"') {
      const end = stringEnd(text, i);
      if (
        depth === 1 &&
        listDepth < 0 &&
        text.slice(i + 1, end) === 'features' &&
        /^\s*:/.test(text.slice(end + 1, end + 200))
      )
        listDepth = 2;
      i = end;
    } else if (c === '{' || c === '[') {
      depth++;
      if (c === '{' && depth === listDepth + 1) lines.push(line);
    } else if (c === '}' || c === ']') {
      depth--;
      if (listDepth > 0 && depth < listDepth) return lines;
    }
  }
  return lines;
}

function stringEnd(text: string, start: number): number {
  let i = start + 1;
  while (i < text.length && text[i] !== '"') i += text[i] === '\\' ? 2 : 1;
  return i;
}
