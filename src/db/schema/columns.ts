import { sql, type SQLWrapper } from 'drizzle-orm';
import { check, customType, doublePrecision, text, timestamp } from 'drizzle-orm/pg-core';
import { SLUG_LENGTH, SLUG_PATTERN } from '../../slug';

/** Row ids are random UUIDs kept as text; they never enter a version's manifest. */
export const id = () =>
  text('id')
    .primaryKey()
    .$defaultFn(() => crypto.randomUUID());

export const moment = (name: string) => timestamp(name, { withTimezone: true, mode: 'date' });

/** Ages and angles: 64-bit floats come back exactly as they were entered. */
export const real = doublePrecision;

/** Both drivers hand out their own byte type; rows always hold a plain Uint8Array. */
export const bytes = customType<{ data: Uint8Array; driverData: Uint8Array }>({
  dataType: () => 'bytea',
  fromDriver: (value) => new Uint8Array(value.buffer, value.byteOffset, value.byteLength),
});

/** `column in (values)`; null passes, as in every check constraint. */
export const oneOf = (name: string, column: SQLWrapper, values: readonly string[]) =>
  check(name, sql`${column} in (${sql.raw(values.map((value) => `'${value}'`).join(', '))})`);

export const within = (name: string, column: SQLWrapper, low: number, high: number) =>
  check(name, sql`${column} >= ${sql.raw(String(low))} and ${column} <= ${sql.raw(String(high))}`);

/** Ages in Ma: 0 is the present, 4600 older than the Earth. */
export const anAge = (name: string, column: SQLWrapper) => within(name, column, 0, 4600);

/** Existence is `younger < age ≤ older`; an interval without length holds no age at all. */
export const older = (name: string, olderAge: SQLWrapper, youngerAge: SQLWrapper): ReturnType<typeof check> =>
  check(name, sql`${olderAge} is null or ${youngerAge} is null or ${youngerAge} < ${olderAge}`);

export const sha256 = (name: string, column: SQLWrapper) => check(name, sql`${column} ~ '^[0-9a-f]{64}$'`);

export const aSlug = (name: string, column: SQLWrapper) =>
  check(
    name,
    sql`${column} ~ ${sql.raw(`'^${SLUG_PATTERN}$'`)} and length(${column}) <= ${sql.raw(String(SLUG_LENGTH))}`,
  );
