import { afterAll, describe, expect, test } from 'vitest';
import { createDataSource, MIGRATIONS } from '#backend/persistence/data-source.ts';
import { migrate } from '#backend/persistence/migrate.ts';
import { WorkspaceScope } from '#backend/persistence/workspace-scope.ts';
import { ProjectEntity } from '#backend/persistence/workspace.entities.ts';
import { startApi } from '#test/support/api-server.ts';
import { buildWorkspace } from '#test/support/api-world.ts';

const api = await startApi('database');
const north = await buildWorkspace(api, 'north');
const south = await buildWorkspace(api, 'south');

afterAll(() => api.stop());

async function drift(): Promise<string[]> {
  const { upQueries } = await api.dataSource.driver.createSchemaBuilder().log();
  return upQueries.map(({ query }) => query);
}

describe('schema', () => {
  test('the entities are what the migrations make', async () => {
    expect(await drift()).toEqual([]);
  });

  test.each([
    ['a column', 'ALTER TABLE projects ADD COLUMN surplus text', 'ALTER TABLE projects DROP COLUMN surplus'],
    [
      'a missing constraint',
      'ALTER TABLE users DROP CONSTRAINT users_email_key',
      'ALTER TABLE users ADD CONSTRAINT users_email_key UNIQUE (email)',
    ],
  ])('%s that only the database has or lacks is seen as drift', async (_, apply, undo) => {
    await api.sql(apply);
    expect(await drift()).toHaveLength(1);
    await api.sql(undo);
    expect(await drift()).toEqual([]);
  });

  test('every list order has an index that serves it', async () => {
    const rows = await api.sql("SELECT indexname FROM pg_indexes WHERE schemaname = 'public'");
    expect(rows.map(({ indexname }) => indexname)).toEqual(
      expect.arrayContaining([
        'projects_name_idx',
        'projects_updated_idx',
        'projects_created_idx',
        'scenarios_name_idx',
        'scenarios_updated_idx',
        'scenarios_life_idx',
        'revisions_pkey',
        'library_items_name_idx',
        'library_items_updated_idx',
      ]),
    );
  });
});

describe('migrations', () => {
  test('up, down and up again leave the same schema', async () => {
    const other = await startApi('migrations');
    const tables = async (): Promise<unknown[]> =>
      other.sql(
        `SELECT table_name, column_name, data_type FROM information_schema.columns
         WHERE table_schema = 'public' AND table_name <> 'migrations' ORDER BY 1, 2`,
      );
    const before = await tables();
    for (const _ of MIGRATIONS) await other.dataSource.undoLastMigration();
    expect(await tables()).toEqual([]);
    expect(await migrate(other.dataSource)).toHaveLength(MIGRATIONS.length);
    expect(await tables()).toEqual(before);
    expect(await migrate(other.dataSource)).toEqual([]);
    await other.stop();
  });

  test('servers that start at once on an empty database do not collide', async () => {
    const other = await startApi('together');
    for (const _ of MIGRATIONS) await other.dataSource.undoLastMigration();
    const sources = await Promise.all([1, 2, 3].map(() => createDataSource(other.databaseUrl).initialize()));
    const done = await Promise.all(sources.map(migrate));
    expect(done.flat()).toHaveLength(MIGRATIONS.length);
    await Promise.all(sources.map((source) => source.destroy()));
    await other.stop();
  });
});

describe('rows of a workspace', () => {
  const insertScenario = `INSERT INTO scenarios (id, workspace_id, project_id, name, updated_by)
    VALUES (gen_random_uuid(), $1, $2, 'X', $3)`;

  test.each([
    ['a scenario in a project of another workspace', [north.id, south.projectId, north.userIds.owner], 'project_fkey'],
    [
      'a scenario changed by somebody else’s member',
      [north.id, north.projectId, south.userIds.owner],
      'updated_by_fkey',
    ],
  ])('%s is refused by the database', async (_, values, constraint) => {
    await expect(api.sql(insertScenario, values)).rejects.toThrow(`scenarios_${constraint}`);
  });

  test('a revision of a scenario of another workspace is refused by the database', async () => {
    const insert = `INSERT INTO revisions (scenario_id, number, workspace_id, document, author_id)
      VALUES ($1, 3, $2, '{}', $3)`;
    await expect(api.sql(insert, [south.scenarioId, north.id, north.userIds.owner])).rejects.toThrow(
      'revisions_scenario_fkey',
    );
  });

  test('a scenario without its current revision cannot be committed', async () => {
    await expect(api.sql(insertScenario, [north.id, north.projectId, north.userIds.owner])).rejects.toThrow(
      'scenarios_current_revision_fkey',
    );
  });

  test('a scope adds its workspace to every query and refuses to be dropped', async () => {
    const scope = new WorkspaceScope(api.dataSource.manager, north.id);
    const query = scope.select(ProjectEntity, 'p');
    expect(query.getSql()).toContain('workspace_id');
    expect(() => query.where('true')).toThrow('would drop the workspace');
    expect(() => query.andWhere('true').orWhere('true')).toThrow('would drop the workspace');
    const update = scope.update(ProjectEntity, { name: 'X' });
    expect(() => update.where('true')).toThrow('would drop the workspace');
  });

  test('a scope without workspace cannot be made', () => {
    expect(() => new WorkspaceScope(api.dataSource.manager, '')).toThrow(TypeError);
  });

  test('a row that names another workspace than its scope is not inserted', async () => {
    const scope = new WorkspaceScope(api.dataSource.manager, north.id);
    const row = { id: south.projectId, workspaceId: south.id, name: 'X' };
    await expect(scope.insert(ProjectEntity, () => row)).rejects.toThrow('another workspace');
  });
});

describe('a write of several rows', () => {
  test('stores nothing when its last statement fails', async () => {
    const count = async (): Promise<unknown> => (await api.sql('SELECT count(*) FROM scenarios'))[0];
    const before = await count();
    const failing = api.database.transaction(async (unit) => {
      const { scenarios } = unit.workspace(north.id);
      await scenarios.create(north.projectId, { name: 'X', forecast: null, updatedById: north.userIds.owner });
      throw new Error('power cut');
    });
    await expect(failing).rejects.toThrow('power cut');
    expect(await count()).toEqual(before);
  });
});
