import { and, eq, inArray, ne, sql } from 'drizzle-orm';
import type { Transaction } from '~/db/client';
import { project, rotation } from '~/db/schema';
import { constraintProblem } from '~/server/constraint-problems';
import { Problem, type FieldError } from '~/server/problem';
import type { Edit, Table } from './contract';
import { canonicalCells } from './order';
import { parseCells, resolveGeometries } from './parse';
import { CARRIED, DB_TABLES, toColumns, toFields, type LogRow } from './tables';

/** One row changed, as the change log keeps it. */
export interface Changed {
  readonly entity: Table;
  readonly entity_id: string;
  readonly before: LogRow | null;
  readonly after: LogRow | null;
}

const CHUNK = 500;

/** Applies edits in their order inside a transaction and answers every row that changed, dependent ones included. */
export class Draft {
  readonly changed: Changed[] = [];
  /** Where the edit that made or last changed a row stands in the request. */
  readonly pathById = new Map<string, string>();

  constructor(
    private readonly tx: Transaction,
    private readonly projectId: string,
    private readonly pathOf: (index: number) => string,
  ) {}

  /** @throws Problem `InvalidRows`, `NotFound` or `Conflict` */
  async apply(edits: readonly Edit[]): Promise<void> {
    for (let start = 0; start < edits.length;) {
      const { op, table } = edits[start]!;
      let end = start + 1;
      while (end < edits.length && edits[end]!.op === op && edits[end]!.table === table) end++;
      const group = edits.slice(start, end).map((edit, i) => ({ edit, path: this.pathOf(start + i) }));
      if (op === 'create') await this.create(table, group as Placed<'create'>[]);
      else if (op === 'update') await this.update(table, group as Placed<'update'>[]);
      else await this.remove(table, group as Placed<'delete'>[]);
      start = end;
    }
  }

  private async create(table: Table, group: readonly Placed<'create'>[]): Promise<void> {
    const cells = await resolveGeometries(
      this.tx,
      this.projectId,
      table,
      group.map(({ edit, path }) => ({ cells: edit.fields, path })),
    );
    const parsed = parseCells(table, cells);
    const rows = parsed.map((fields, i): LogRow => ({
      id: group[i]!.edit.id ?? crypto.randomUUID(),
      ...fields,
    }));
    rows.forEach((row, i) => this.pathById.set(row.id, group[i]!.path));
    await this.insertAll(table, rows);
  }

  /** Puts rows in as they are, ids included. */
  async insertAll(table: Table, rows: readonly LogRow[]): Promise<void> {
    for (let i = 0; i < rows.length; i += CHUNK) await this.insert(table, rows.slice(i, i + CHUNK));
  }

  private async insert(table: Table, rows: readonly LogRow[]): Promise<void> {
    const target = DB_TABLES[table];
    const values = rows.map((row) => ({ ...toColumns(table, row), project_id: this.projectId }));
    const pathOf = (read: string) =>
      this.pathById.get((rows.find((row) => Object.values(row).includes(read)) ?? rows[0]!).id);
    await this.guarded(pathOf, () => this.tx.insert(target).values(values));
    for (const row of rows) this.changed.push({ entity: table, entity_id: row.id, before: null, after: row });
  }

  private async update(table: Table, group: readonly Placed<'update'>[]): Promise<void> {
    const current = await this.rowsById(
      table,
      group.map(({ edit }) => edit.id),
    );
    const merged = group.map(({ edit, path }) => {
      const row = current.get(edit.id);
      if (!row) throw missing(table, edit.id, path);
      return { row, path, cells: edit.fields };
    });
    const given = await resolveGeometries(this.tx, this.projectId, table, merged);
    // Two edits of one row: the second builds on what the first made of it.
    const replacements: Replacement[] = [];
    for (const [i, { row, path }] of merged.entries()) {
      const before = current.get(row.id)!;
      const { id, ...fields } = before;
      const [parsed] = parseCells(table, [{ cells: { ...fields, ...given[i]!.cells }, path }]);
      const after: LogRow = { id, ...parsed };
      this.pathById.set(id, path);
      replacements.push({ before, after });
      current.set(id, after);
    }
    await this.replaceAll(table, replacements);
  }

  /** Writes rows over others in their order; many at once where no row comes twice and no code changes. */
  async replaceAll(table: Table, replacements: readonly Replacement[]): Promise<void> {
    const changing = replacements.filter(
      ({ before, after }) => canonicalCells(before) !== canonicalCells(after),
    );
    const ids = new Set(changing.map(({ after }) => after.id));
    const oneByOne = table === 'blocks' || ids.size < changing.length;
    if (oneByOne) for (const { before, after } of changing) await this.replace(table, before, after);
    else
      for (let i = 0; i < changing.length; i += CHUNK)
        await this.overwrite(table, changing.slice(i, i + CHUNK));
  }

  private async overwrite(table: Table, replacements: readonly Replacement[]): Promise<void> {
    const target = DB_TABLES[table];
    const values = replacements.map(({ after }) => ({
      ...toColumns(table, after),
      project_id: this.projectId,
    }));
    const set = Object.fromEntries(
      Object.keys(values[0]!)
        .filter((column) => column !== 'id' && column !== 'project_id')
        .map((column) => [column, sql`excluded.${sql.identifier(column)}`]),
    );
    const pathOf = (read: string) =>
      this.pathById.get(
        (replacements.find(({ after }) => Object.values(after).includes(read)) ?? replacements[0]!).after.id,
      );
    await this.guarded(pathOf, () =>
      this.tx.insert(target).values(values).onConflictDoUpdate({ target: target.id, set }),
    );
    for (const { before, after } of replacements)
      this.changed.push({ entity: table, entity_id: after.id, before, after });
  }

  /** Writes `after` over `before`; a block's new code carries its rows, those that refer to it and the project's choice along. */
  private async replace(table: Table, before: LogRow, after: LogRow): Promise<void> {
    if (canonicalCells(before) === canonicalCells(after)) return;
    const target = DB_TABLES[table];
    const { id, ...fields } = after;
    const renamed = table === 'blocks' && before['code'] !== after['code'];
    const carried = renamed ? await this.rowsNaming(String(before['code'])) : [];
    await this.guarded(
      () => this.pathById.get(id),
      () =>
        this.tx
          .update(target)
          .set(toColumns(table, fields))
          .where(this.own(table, [id])),
    );
    this.changed.push({ entity: table, entity_id: id, before, after });
    if (!renamed) return;
    const code = String(after['code']);
    // The foreign key has carried `block` along; `relative_to` has none.
    await this.tx
      .update(rotation)
      .set({ relative_to: code })
      .where(and(eq(rotation.project_id, this.projectId), eq(rotation.relative_to, String(before['code']))));
    await this.tx
      .update(project)
      .set({ held_still: code })
      .where(and(eq(project.id, this.projectId), eq(project.held_still, String(before['code']))));
    for (const { entity, row } of carried) {
      const moved = Object.fromEntries(
        Object.entries(row).map(([name, value]) => [
          name,
          isName(name) && value === before['code'] ? code : value,
        ]),
      ) as LogRow;
      this.changed.push({ entity, entity_id: row.id, before: row, after: moved });
    }
  }

  private async remove(table: Table, group: readonly Placed<'delete'>[]): Promise<void> {
    const gone = new Set(
      this.changed.filter(({ after }) => after === null).map(({ entity_id }) => entity_id),
    );
    const wanted = group.filter(({ edit }) => !gone.has(edit.id));
    const current = await this.rowsById(
      table,
      wanted.map(({ edit }) => edit.id),
    );
    for (const { edit, path } of wanted) {
      const row = current.get(edit.id);
      if (!row) throw missing(table, edit.id, path);
      if (table === 'blocks') await this.removeCarried(String(row['code']));
    }
    await this.delete(table, [...current.values()]);
  }

  /** A deleted block takes its outlines, rotations and features along; its directions stay, without a block. */
  private async removeCarried(code: string): Promise<void> {
    for (const table of ['outlines', 'rotations', 'features'] as const) {
      await this.delete(table, await this.rowsOf(table, code));
    }
    for (const row of await this.rowsOf('directions', code))
      await this.replace('directions', row, { ...row, block: null });
  }

  async delete(table: Table, rows: readonly LogRow[]): Promise<void> {
    if (rows.length === 0) return;
    await this.tx.delete(DB_TABLES[table]).where(
      this.own(
        table,
        rows.map(({ id }) => id),
      ),
    );
    for (const row of rows) this.changed.push({ entity: table, entity_id: row.id, before: row, after: null });
  }

  /** Rows of this project by id; ids of other projects are not among them. */
  async rowsById(table: Table, ids: readonly string[]): Promise<Map<string, LogRow>> {
    const found = new Map<string, LogRow>();
    for (let i = 0; i < ids.length; i += 1000) {
      const rows = await this.tx
        .select()
        .from(DB_TABLES[table])
        .where(this.own(table, ids.slice(i, i + 1000)));
      for (const row of rows) found.set(row.id, toFields(table, row));
    }
    return found;
  }

  private async rowsOf(table: (typeof CARRIED)[number], code: string): Promise<LogRow[]> {
    const target = DB_TABLES[table] as unknown as typeof rotation;
    const rows = await this.tx
      .select()
      .from(target)
      .where(and(eq(target.project_id, this.projectId), eq(target.block, code)));
    return rows.map((row) => toFields(table, row));
  }

  /** Rows that cannot be without the block. */
  async carriedBy(code: string): Promise<LogRow[]> {
    return (await Promise.all(CARRIED.map((table) => this.rowsOf(table, code)))).flat();
  }

  private async rowsNaming(code: string): Promise<{ entity: Table; row: LogRow }[]> {
    const naming: { entity: Table; row: LogRow }[] = [];
    for (const entity of CARRIED)
      for (const row of await this.rowsOf(entity, code)) naming.push({ entity, row });
    const referring = await this.tx
      .select()
      .from(rotation)
      .where(
        and(
          eq(rotation.project_id, this.projectId),
          eq(rotation.relative_to, code),
          ne(rotation.block, code),
        ),
      );
    return [
      ...naming,
      ...referring.map((row) => ({ entity: 'rotations' as const, row: toFields('rotations', row) })),
    ];
  }

  private own(table: Table, ids: readonly string[]) {
    const target = DB_TABLES[table];
    return and(eq(target.project_id, this.projectId), inArray(target.id, [...ids]));
  }

  /** A constraint that is checked at once names the edit that broke it. */
  private async guarded<T>(
    pathOf: (read: string) => string | undefined,
    write: () => PromiseLike<T>,
  ): Promise<T> {
    try {
      return await write();
    } catch (error) {
      const constraint = constraintProblem(error, pathOf);
      throw constraint ? new Problem(constraint.name, constraint.facts) : error;
    }
  }
}

interface Replacement {
  readonly before: LogRow;
  readonly after: LogRow;
}

interface Placed<Op extends Edit['op']> {
  readonly edit: Extract<Edit, { op: Op }>;
  readonly path: string;
}

const isName = (column: string) => column === 'block' || column === 'relative_to';

function missing(table: Table, id: string, path: string): Problem {
  const error: FieldError = {
    path,
    read: id,
    problem: `no such row in ${table}`,
    hint: 'It may have been deleted: read the table again.',
  };
  return new Problem('NotFound', { detail: error.problem, errors: [error] });
}
