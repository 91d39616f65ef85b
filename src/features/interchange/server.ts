/** Imports and exports of the project's own files. */
import { and, eq } from 'drizzle-orm';
import { createHash } from 'node:crypto';
import { database } from '~/db/client';
import { importFile } from '~/db/schema';
import { editDraft, type ExpectedRevision } from '~/features/ledger/server';
import { loadShapes } from '~/features/ledger/shapes';
import { loadState, type State } from '~/features/ledger/state';
import { demand, type Access } from '~/server/access';
import { Problem } from '~/server/problem';
import type { Answers, ColumnMapping, ImportReport } from './contract';
import type { ExportName, ImportKind } from './files';
import { blocksGeojson, directionsCsv, featuresGeojson, rotationsCsv } from './exports';
import { readBlocks } from './rules/blocks';
import { decode } from './rules/decode';
import { readDirections } from './rules/directions';
import { readFeatures } from './rules/features';
import type { ImportPlan } from './rules/plan';
import { planBlocks } from './rules/plan-blocks';
import { planDirections, planFeatures } from './rules/plan-evidence';
import { planRotations } from './rules/plan-rotations';
import { countRows, rejectedFile } from './rules/rejected-file';
import { readRotations, type FileReading } from './rules/rotations';
import { usable } from './usable';

export interface ImportRequest {
  readonly file: { readonly name: string; readonly bytes: Uint8Array };
  readonly kind: ImportKind;
  readonly answers: Answers;
  readonly mapping: ColumnMapping;
  readonly dryRun: boolean;
  readonly skipRejected: boolean;
  /** The revision that the preview was read at, where the caller holds to it. */
  readonly expected: ExpectedRevision;
}

/** Rows listed in a report; the rest is counted. */
const MOST_REJECTED = 500;
const MOST_PREVIEW = 100;

/**
 * Reads a file and, unless it is a dry run, has open questions or rejected rows that are not to be skipped, writes its
 * rows as one step of the change log, keeping the file as it came.
 */
export async function importInto(access: Access, request: ImportRequest): Promise<ImportReport> {
  demand(access, 'import');
  requireText(request.file.bytes);
  const { text, notes } = decode(request.file.bytes);
  const state = await loadState(access, 'draft');
  const { reading, plan } = readFile(text, request, state);
  const questions = reading.asking.questions();
  const report: ImportReport = {
    kind: request.kind,
    file: request.file.name,
    accepted: plan.accepted,
    rejected: plan.rejected.slice(0, MOST_REJECTED).map((row) => ({ ...row, read: row.read.slice(0, 200) })),
    rejected_rows: countRows(plan.rejected),
    rejected_beyond: Math.max(0, plan.rejected.length - MOST_REJECTED),
    questions,
    settled: reading.asking.settled(),
    notes: [...notes, ...reading.notes],
    preview: plan.preview.slice(0, MOST_PREVIEW).map((row) => ({ ...row })),
    table: reading.table
      ? {
          headings: [...reading.table.headings],
          columns: [...reading.table.columns],
          required: [...reading.table.required],
        }
      : null,
    written: false,
    revision: state.revision,
    import_id: null,
  };
  const blocked =
    questions.length > 0 || (plan.rejected.length > 0 && !request.skipRejected) || plan.accepted === 0;
  return request.dryRun || blocked ? report : write(access, request, text, plan, report);
}

/** @throws Problem `InvalidRequest` for a file that holds nothing, or nothing that is text */
function requireText(bytes: Uint8Array): void {
  const utf16 = (bytes[0] === 0xff && bytes[1] === 0xfe) || (bytes[0] === 0xfe && bytes[1] === 0xff);
  if (bytes.every((byte) => byte === 0x20 || (byte >= 0x09 && byte <= 0x0d)))
    throw new Problem('InvalidRequest', { detail: 'The file is empty.' });
  if (!utf16 && bytes.subarray(0, 65_536).includes(0))
    throw new Problem('InvalidRequest', {
      detail: 'The file is not text. Save a table as CSV, outlines as GeoJSON.',
    });
}

function readFile(
  text: string,
  { kind, answers, mapping }: ImportRequest,
  state: State,
): { reading: FileReading<unknown>; plan: ImportPlan } {
  const codes = new Set(state.blocks.map((block) => block.code));
  switch (kind) {
    case 'blocks': {
      const reading = usable(readBlocks(text, answers), kind, ({ fields }) => fields);
      return { reading, plan: planBlocks(reading, state.blocks) };
    }
    case 'rotations': {
      const reading = usable(readRotations(text, answers, mapping), kind, (fields) => fields);
      return { reading, plan: planRotations(reading, state) };
    }
    case 'features': {
      const reading = usable(readFeatures(text, codes, answers), kind, ({ fields }) => fields);
      return { reading, plan: planFeatures(reading, state.features) };
    }
    case 'directions': {
      const reading = usable(readDirections(text, codes, answers, mapping), kind, (fields) => fields);
      return { reading, plan: planDirections(reading, state.directions) };
    }
  }
}

async function write(
  access: Access,
  request: ImportRequest,
  text: string,
  plan: ImportPlan,
  report: ImportReport,
): Promise<ImportReport> {
  const { file, kind, expected } = request;
  const import_id = crypto.randomUUID();
  const { revision } = await editDraft(access, plan.edits, {
    expected,
    action: 'import',
    label: `Import ${file.name}`.slice(0, 200),
    alongside: async (tx, made) => {
      await tx.insert(importFile).values({
        id: import_id,
        project_id: access.project.id,
        name: file.name.slice(0, 255),
        kind,
        sha256: createHash('sha256').update(file.bytes).digest('hex'),
        content: file.bytes,
        report: { ...report, preview: [] },
        rejected: plan.rejected.length > 0 ? rejectedFile(kind, text, plan.rejected) : null,
        revision: made,
        imported_by: access.actor.user!.id,
      });
    },
  });
  return { ...report, written: true, revision, import_id };
}

/** The rejected rows of one import, to mend and try again. @throws Problem `NotFound` */
export async function rejectedRows(
  access: Access,
  id: string,
): Promise<{ name: string; type: string; text: string }> {
  demand(access, 'import');
  const own = and(eq(importFile.project_id, access.project.id), eq(importFile.id, id));
  const [row] = await database()
    .select({ name: importFile.name, kind: importFile.kind, rejected: importFile.rejected })
    .from(importFile)
    .where(own);
  if (!row?.rejected) throw new Problem('NotFound');
  const isGeojson = row.kind === 'blocks' || row.kind === 'features';
  const base = row.name.replace(/\.[^.]*$/, '').replace(/-rejected$/, '');
  return {
    name: `${base}-rejected.${isGeojson ? 'geojson' : 'csv'}`,
    type: isGeojson ? 'application/geo+json; charset=utf-8' : 'text/csv; charset=utf-8',
    text: row.rejected,
  };
}

/** A kept original, byte for byte. @throws Problem `NotFound` */
export async function importedFile(
  access: Access,
  id: string,
): Promise<{ name: string; content: Uint8Array }> {
  demand(access, 'import');
  const own = and(eq(importFile.project_id, access.project.id), eq(importFile.id, id));
  const [row] = await database()
    .select({ name: importFile.name, content: importFile.content })
    .from(importFile)
    .where(own);
  if (!row) throw new Problem('NotFound');
  return row;
}

/** One of the project's files, as a state has it. */
export async function exportFile(state: State, name: ExportName): Promise<{ type: string; body: string }> {
  const geojson = 'application/geo+json; charset=utf-8';
  const csv = 'text/csv; charset=utf-8';
  switch (name) {
    case 'blocks.geojson':
      return {
        type: geojson,
        body: blocksGeojson(state.blocks, await loadShapes(state.outlines.map((o) => o.sha256))),
      };
    case 'features.geojson':
      return {
        type: geojson,
        body: featuresGeojson(state.features, await loadShapes(state.features.map((f) => f.sha256))),
      };
    case 'rotations.csv':
      return { type: csv, body: rotationsCsv(state.rotations) };
    case 'directions.csv':
      return { type: csv, body: directionsCsv(state.directions) };
  }
}
