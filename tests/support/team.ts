import { eq } from 'drizzle-orm';
import { membership, project } from '~/db/schema';
import type { Role } from '~/features/projects/contract';
import type { Answer, TestApp, TestUser } from './app';

/** A project with someone for each standing that the policy tells apart. */
export interface Team extends Readonly<Record<Role | 'outsider' | 'admin', TestUser>> {
  readonly slug: string;
  readonly id: string;
  /** Address of something in the project. */
  readonly at: (path?: string) => string;
}

export async function createTeam(
  app: TestApp,
  slug = 'tarn-sea',
  settings: Partial<typeof project.$inferInsert> = {},
): Promise<Team> {
  const people = {
    lead: await app.signedUp(`${slug} lead`),
    researcher: await app.signedUp(`${slug} researcher`),
    reviewer: await app.signedUp(`${slug} reviewer`),
    instructor: await app.signedUp(`${slug} instructor`),
  };
  const [made] = await app.db
    .insert(project)
    .values({ slug, title: 'Closing of the Tarn', ...settings })
    .returning();
  const id = made!.id;
  for (const [role, { id: user_id }] of Object.entries(people)) {
    await app.db.insert(membership).values({ project_id: id, user_id, role: role as Role });
  }
  const outsider = await app.signedUp(`${slug} outsider`);
  const admin = await app.signedUp(`${slug} admin`, 'admin');
  return {
    ...people,
    outsider,
    admin,
    slug,
    id,
    at: (path = '') => `/api/projects/${slug}${path ? `/${path}` : ''}`,
  };
}

export async function revisionOf(app: TestApp, { id }: Team): Promise<number> {
  const [row] = await app.db.select({ revision: project.revision }).from(project).where(eq(project.id, id));
  return row!.revision;
}

/** Sends rows to a table as the researcher, on whatever revision there is. */
export const add = (app: TestApp, team: Team, table: string, body: unknown): Promise<Answer> =>
  app.call('POST', team.at(table), { as: team.researcher, body, revision: '*' });

export const frame = (code: string) => ({ code, name: code, kind: 'frame' });
export const terrane = (code: string) => ({ code, name: `${code} terrane`, kind: 'terrane' });

type Rotation = readonly [
  block: string,
  relative_to: string,
  age_ma: number,
  pole_lat: number,
  pole_lon: number,
  angle_deg: number,
];
export const rotation = ([block, relative_to, age_ma, pole_lat, pole_lon, angle_deg]: Rotation) => ({
  block,
  relative_to,
  age_ma,
  pole_lat,
  pole_lon,
  angle_deg,
});

/** Adds the blocks that rotations name, references nobody rotates as frames, then the rotations. */
export async function addRotations(app: TestApp, team: Team, rows: readonly Rotation[]): Promise<Answer> {
  const blocks = new Set(rows.map(([block]) => block));
  const frames = new Set(rows.map(([, reference]) => reference).filter((code) => !blocks.has(code)));
  await add(app, team, 'blocks', [...[...frames].map(frame), ...[...blocks].map(terrane)]);
  return add(app, team, 'rotations', rows.map(rotation));
}

export const square = (lon: number, lat: number, side = 4) => ({
  type: 'Polygon' as const,
  coordinates: [
    [
      [lon, lat],
      [lon + side, lat],
      [lon + side, lat + side / 2],
      [lon, lat + side / 2],
      [lon, lat],
    ],
  ],
});
