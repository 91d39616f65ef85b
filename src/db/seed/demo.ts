/**
 * The demo project, built as its team would have built it: files through the import, edits through the ledger, versions
 * by release. Blocks, people and papers are invented.
 */
import { eq } from 'drizzle-orm';
import { membership, project, user } from '~/db/schema';
import { DEMO_PEOPLE } from '~/features/accounts/people';
import type { ImportKind } from '~/features/interchange/files';
import { importInto } from '~/features/interchange/server';
import type { Edit, Row, Table } from '~/features/ledger/contract';
import { editDraft } from '~/features/ledger/server';
import { loadState } from '~/features/ledger/state';
import type { Role } from '~/features/projects/contract';
import { changeProject, makeProject } from '~/features/projects/server';
import { release } from '~/features/versions/server';
import { openProject, type Access } from '~/server/access';
import type { Actor } from '~/server/actor';
import type { Database } from '../client';
import { DEMO_SOURCES, OUTLINE_SOURCES } from './demo-sources';
import { BEFORE_QUILL_POSED, BEFORE_SABLE_REFIT, LATER_NOTES, type RotationEdit } from './demo-history';
import blocksFile from './lantern-sea/blocks.geojson?raw';
import directionsFile from './lantern-sea/directions.csv?raw';
import featuresFile from './lantern-sea/features.geojson?raw';
import rotationsFile from './lantern-sea/rotations.csv?raw';

export const DEMO_SLUG = 'lantern-sea';
const LICENCE = 'CC BY 4.0';
const SUMMARY =
  'Sable terrane left Tarn craton at about 132 Ma, crossed the Lantern Sea at up to 109 mm/yr and met Old Harrow craton at 55.2 Ma. ' +
  'The history rests on magnetic isochrons between Sable and Tarn and 22 palaeomagnetic directions from the Gannet beds. The scenario is invented.';

export async function seedDemo(db: Database): Promise<void> {
  const [there] = await db.select({ id: project.id }).from(project).where(eq(project.slug, DEMO_SLUG));
  if (there) return;
  const actors = await actorsOf(db);
  const lead = actors.get('Mara Kell')!;
  await makeProject(lead, {
    title: 'Closing of the Lantern Sea',
    slug: DEMO_SLUG,
    summary: SUMMARY,
    visibility: 'public',
    licence: LICENCE,
    real_earth: false,
  });
  await join(db, actors);
  const as = (name: string): Promise<Access> => openProject(actors.get(name)!, DEMO_SLUG, 'ledger.edit');
  const [mara, tobin, sefa] = [await as('Mara Kell'), await as('Tobin Ashgrove'), await as('Sefa Lund')];
  const freeze = (title: string, note = ''): Promise<unknown> =>
    release(mara, { title, note, licence: LICENCE });

  await take(mara, 'blocks', 'blocks.geojson', blocksFile);
  await changeProject(mara, { draft_public: true, held_still: 'spin-axis' });
  await freeze('Outlines of ten blocks');
  await take(tobin, 'rotations', 'rotations.csv', rotationsFile);
  await edit(
    tobin,
    await rotationEdits(tobin, [...BEFORE_SABLE_REFIT, ...BEFORE_QUILL_POSED]),
    'Rotations as first read from the papers',
  );
  await freeze('First rotations, 0 to 178 Ma');
  await take(tobin, 'features', 'features.geojson', featuresFile);
  await freeze('Present coasts carried by their blocks');
  await edit(
    mara,
    [...sourceEdits(), ...(await outlineSourceEdits(mara))],
    'Name the source of every outline',
  );
  await freeze('Sources named');
  await take(sefa, 'directions', 'directions.csv', directionsFile);
  await edit(sefa, await directionSourceEdits(sefa), 'Name the source of every direction');
  await freeze('Directions of the Gannet beds');
  await edit(tobin, await restore(tobin, BEFORE_QUILL_POSED), 'Pose Quill arc again');
  await freeze('Quill arc posed');
  await edit(tobin, await restore(tobin, BEFORE_SABLE_REFIT), 'Refit Sable, 61 to 74 Ma');
  await freeze('Sable refit, 61 to 74 Ma', 'Rows 61.3, 66.0 and 73.6 Ma refitted to the isochrons.');
  for (const [i, { label, ...later }] of LATER_NOTES.entries()) {
    const by = i % 2 === 0 ? tobin : sefa;
    await edit(by, await rotationEdits(by, [later]), label);
  }
}

async function actorsOf(db: Database): Promise<Map<string, Actor>> {
  const rows = await db.select().from(user).where(eq(user.is_demo, true));
  return new Map(
    rows.map(({ id, name, email, site_role, is_demo }) => [
      name,
      { user: { id, name, email, site_role, is_demo }, via: 'session', scope: 'write' },
    ]),
  );
}

async function join(db: Database, actors: Map<string, Actor>): Promise<void> {
  const [row] = await db.select({ id: project.id }).from(project).where(eq(project.slug, DEMO_SLUG));
  const members = DEMO_PEOPLE.filter(({ role }) => role !== 'admin' && role !== 'lead');
  const others = [
    ...members,
    ...DEMO_PEOPLE.filter(({ name, role }) => role === 'lead' && name !== 'Mara Kell'),
  ];
  await db.insert(membership).values(
    others.map(({ name, role }) => ({
      project_id: row!.id,
      user_id: actors.get(name)!.user!.id,
      role: role as Role,
    })),
  );
}

async function take(access: Access, kind: ImportKind, name: string, text: string): Promise<void> {
  const file = { name, bytes: new TextEncoder().encode(text) };
  const report = await importInto(access, {
    file,
    kind,
    answers: {},
    mapping: {},
    dryRun: false,
    skipRejected: false,
    expected: '*',
  });
  if (!report.written)
    throw new Error(
      `The demo's ${name} was not taken: ${JSON.stringify(report.rejected[0] ?? report.questions[0])}`,
    );
}

const edit = (access: Access, edits: readonly Edit[], label: string): Promise<unknown> =>
  editDraft(access, edits, { expected: '*', action: 'edit', label });

const update = (table: Table, id: string, fields: Record<string, unknown>): Edit => ({
  op: 'update',
  table,
  id,
  fields,
});

type RotationRow = Row<'rotations'>;
const meets = (row: RotationRow, { block, relative_to, age_ma }: RotationEdit['row']): boolean =>
  row.block === block && row.relative_to === relative_to && row.age_ma === age_ma;

async function rotationEdits(access: Access, edits: readonly RotationEdit[]): Promise<Edit[]> {
  const { rotations } = await loadState(access, 'draft');
  return edits.map(({ row, fields }) =>
    update('rotations', rotations.find((r) => meets(r, row))!.id, fields),
  );
}

/** The file's own values for rows that were seeded with earlier ones. */
function restore(access: Access, edits: readonly RotationEdit[]): Promise<Edit[]> {
  return rotationEdits(
    access,
    edits.map(({ row, fields, now }) => ({ row, fields: now ?? fields })),
  );
}

const sourceEdits = (): Edit[] =>
  DEMO_SOURCES.map((fields) => ({ op: 'create', table: 'sources', fields: { ...fields } }));

async function outlineSourceEdits(access: Access): Promise<Edit[]> {
  const { blocks } = await loadState(access, 'draft');
  return blocks
    .filter(({ code }) => code in OUTLINE_SOURCES)
    .map(({ id, code }) => update('blocks', id, { source: OUTLINE_SOURCES[code] }));
}

async function directionSourceEdits(access: Access): Promise<Edit[]> {
  const { directions } = await loadState(access, 'draft');
  return directions.map(({ id, rock }) =>
    update('directions', id, { source: rock === 'lava' ? 'Lund & Quarrie 2020' : 'Pell 2016' }),
  );
}
