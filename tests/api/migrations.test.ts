import { randomUUID } from 'node:crypto';

import type { MikroORM } from '@mikro-orm/postgresql';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import { migrationsList } from '#server/db/migrations/index.ts';
import { createOrm, migrate } from '#server/db/orm.ts';
import { SpecVersion } from '#server/modules/specs/spec.entity.ts';

import { type TestApp, startTestApp } from '#tests/support/app.ts';
import { createEmptyDatabase } from '#tests/support/database.ts';
import { type TeamWorld, aTeamWorld } from '#tests/support/team-world.ts';

describe('the migrations of an empty database', () => {
  let orm: MikroORM;
  let drop: () => Promise<void>;
  let done: string[];
  beforeAll(async () => {
    const database = await createEmptyDatabase();
    drop = database.drop;
    orm = await createOrm({ databaseUrl: database.databaseUrl });
    done = await migrate(orm);
  });
  afterAll(async () => {
    await orm.close(true);
    await drop();
  });

  it('are all done, in their order', () => {
    expect(done).toEqual(migrationsList.map(({ name }) => name));
    expect(done).toEqual(done.toSorted());
  });

  it('make the tables that the entities describe', async () => {
    expect(await orm.getSchemaGenerator().getUpdateSchemaSQL({ wrap: false })).toBe('');
  });

  it('do nothing the second time', async () => {
    expect(await migrate(orm)).toEqual([]);
  });

  it('are done once when two servers start at the same moment', async () => {
    const database = await createEmptyDatabase();
    const orms = await Promise.all([1, 2].map(() => createOrm({ databaseUrl: database.databaseUrl })));
    const results = await Promise.allSettled(orms.map((each) => migrate(each)));
    const first = orms[0];
    expect(results.map(({ status }) => status)).toEqual(['fulfilled', 'fulfilled']);
    expect(await first?.getMigrator().getExecutedMigrations()).toHaveLength(migrationsList.length);
    expect(await first?.getSchemaGenerator().getUpdateSchemaSQL({ wrap: false })).toBe('');
    await Promise.all(orms.map((each) => each.close(true)));
    await database.drop();
  });
});

describe('what the database itself refuses', () => {
  let app: TestApp;
  let world: TeamWorld;
  beforeAll(async () => {
    app = await startTestApp();
    world = await aTeamWorld(app);
  });
  afterAll(() => app.stop());

  const execute = (sql: string, parameters: unknown[] = []) =>
    app.orm.em.getConnection().execute(sql, parameters);
  const id = (name: string) => world.ids[name] ?? '';

  it.each([
    ['a change of the history', `update audit_event set summary = 'nothing happened' where team_id = ?`],
    ['a deletion from the history', 'delete from audit_event where team_id = ?'],
    ['the deletion of a team with a history', 'delete from team where id = ?'],
  ])('%s', async (_title, sql) => {
    const count = () => execute('select count(*) from audit_event where team_id = ?', [id('teamId')]);
    const before = await count();
    await expect(execute(sql, [id('teamId')])).rejects.toThrow(
      /never changed or deleted|violates foreign key/,
    );
    expect(await count()).toEqual(before);
  });

  it.each([
    ['body', `body = '{"lines":[]}'`],
    ['ingredients', `ingredients = '[]'`],
    ['glass', 'glass = null'],
    ['house measures', `house_measures = '{}'`],
    ['figures', `figures = '{}'`],
    ['calculation version', `calculation_version = '0'`],
    ['reason', `why = 'another'`],
    ['changes', `changes = '["none"]'`],
    ['number', 'number = 99'],
    ['team', 'team_id = gen_random_uuid()'],
    ['time', 'created_at = now()'],
  ])('a change of the %s of a version', async (_title, change) => {
    await expect(
      execute(`update spec_version set ${change} where id = ?`, [id('versionId')]),
    ).rejects.toThrow('a version is immutable');
  });

  it('not a change of the state of a version', async () => {
    await execute(`update spec_version set state = 'on trial' where id = ?`, [id('versionId')]);
    const version = await app.orm.em.fork().findOneOrFail(SpecVersion, { id: id('versionId') });
    expect(version.state).toBe('on trial');
  });

  it('two versions of a spec with one number, and two memberships of a person in a team', async () => {
    await expect(
      execute(
        `insert into spec_version select gen_random_uuid(), 1, team_id, spec_id, number, parent_id, state, body, ingredients,
           glass, house_measures, figures, calculation_version, why, changes from spec_version where id = ?`,
        [id('versionId')],
      ),
    ).rejects.toThrow(/unique/);
    await expect(
      execute(`insert into membership (team_id, user_id, roles) values (?, ?, '{trainer}')`, [
        id('teamId'),
        world.team.members.trainer.id,
      ]),
    ).rejects.toThrow(/unique/);
  });

  it('a membership of nobody', async () => {
    await expect(
      execute(`insert into membership (team_id, user_id, roles) values (?, ?, '{trainer}')`, [
        id('teamId'),
        randomUUID(),
      ]),
    ).rejects.toThrow(/foreign key/);
  });
});
