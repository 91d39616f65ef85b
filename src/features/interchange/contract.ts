/** Shapes of imports and exports, shared by server and client. */
import { z } from 'zod';
import { IMPORT_KINDS } from './files';

/** A row that was not taken, and how to mend it. `column` is a heading, a property or `geometry`. */
export const rejectedRow = z.object({
  line: z.number().int().nullable(),
  /** Of a GeoJSON file, which may be one line: the feature's place in its list, from 1. */
  entry: z.number().int().optional(),
  column: z.string().nullable(),
  read: z.string(),
  problem: z.string(),
  hint: z.string(),
});
export type RejectedRow = z.infer<typeof rejectedRow>;

/** Something that the file leaves open. Nothing is written until each is answered. */
export const question = z.object({
  id: z.string(),
  ask: z.string(),
  choices: z.array(z.string()).min(2),
  /** Up to five places where it arises, as "line 7: 12,5". */
  examples: z.array(z.string()),
});
export type Question = z.infer<typeof question>;

/** A choice that this reading made, by an answer or by default; another answer under its id reads the file anew. */
export const offer = z.object({
  id: z.string(),
  ask: z.string(),
  choices: z.array(z.string()).min(2),
  chosen: z.string(),
});
export type Offer = z.infer<typeof offer>;

/** One row that would be written, as the preview shows it. */
export const previewRow = z.object({
  line: z.number().int().nullable(),
  change: z.enum(['new', 'replaces', 'unchanged', 'kept', 'removed']),
  cells: z.record(z.string(), z.union([z.string(), z.number(), z.null()])),
});
export type PreviewRow = z.infer<typeof previewRow>;

export const importReport = z.object({
  kind: z.enum(IMPORT_KINDS),
  file: z.string(),
  accepted: z.number().int(),
  rejected: z.array(rejectedRow),
  /** Rows of the file with something wrong, each counted once. */
  rejected_rows: z.number().int(),
  /** How many more faults were found than are listed. */
  rejected_beyond: z.number().int(),
  questions: z.array(question),
  settled: z.array(offer),
  /** What was understood without changing a value: a byte-order mark, the separator, ignored columns. */
  notes: z.array(z.string()),
  preview: z.array(previewRow),
  /** For tables: what the file's heading line holds and which columns are read, for a mapping of one's own. */
  table: z
    .object({ headings: z.array(z.string()), columns: z.array(z.string()), required: z.array(z.string()) })
    .nullable(),
  written: z.boolean(),
  revision: z.number().int(),
  /** The kept original; with `rejected_file` where rejected rows were kept to mend. */
  import_id: z.string().nullable(),
});
export type ImportReport = z.infer<typeof importReport>;

export const answers = z.record(z.string(), z.string());
export type Answers = z.infer<typeof answers>;

/** Heading of the file → column of the format, for tables with headings of their own. */
export const columnMapping = z.record(z.string(), z.string());
export type ColumnMapping = z.infer<typeof columnMapping>;
