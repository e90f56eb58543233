import { randomUUID } from 'node:crypto';
import type { SelectQueryBuilder } from 'typeorm';
import type { Page } from '#common/schemas/api/common.ts';
import type { ListQuery, ProjectRecord } from '#backend/domain/records.types.ts';
import { filterList, orderList, readPage } from './listing.ts';
import { ProjectEntity, ScenarioEntity } from './workspace.entities.ts';
import type { WorkspaceScope } from './workspace-scope.ts';

export type ProjectSort = 'name' | '-name' | 'updatedAt' | '-updatedAt' | 'createdAt' | '-createdAt';

export interface ProjectChanges {
  name?: string;
  description?: string;
  archived?: boolean;
}

type ProjectRow = Omit<ProjectRecord, 'scenarioCount'> & { scenarioCount: string };

export class ProjectsRepository {
  readonly #scope: WorkspaceScope;

  constructor(scope: WorkspaceScope) {
    this.#scope = scope;
  }

  async list(query: ListQuery<ProjectSort>): Promise<Page<ProjectRecord>> {
    const builder = filterList(this.#select(), 'p', query);
    orderList(
      builder,
      query.sort,
      { name: 'lower(p.name) COLLATE "C"', updatedAt: 'p.updatedAt', createdAt: 'p.createdAt' },
      'p.id',
    );
    const { rows, total } = await readPage<ProjectRow>(builder, query);
    return { items: rows.map(toProject), page: query.page, pageSize: query.pageSize, total };
  }

  async findById(id: string): Promise<ProjectRecord | null> {
    const row = await this.#select().andWhere('p.id = :id', { id }).getRawOne<ProjectRow>();
    return row ? toProject(row) : null;
  }

  async create(project: { name: string; description: string }): Promise<string> {
    const id = randomUUID();
    await this.#scope.insert(ProjectEntity, (workspaceId) => ({ id, workspaceId, ...project }));
    return id;
  }

  /** False when no row has this id and version: it is gone, or somebody else was faster. */
  async updateIfVersion(id: string, version: number, { archived, ...changes }: ProjectChanges): Promise<boolean> {
    const result = await this.#scope
      .update(ProjectEntity, {
        ...changes,
        ...(archived === undefined ? {} : { archivedAt: archived ? () => 'COALESCE(archived_at, now())' : null }),
        version: () => 'version + 1',
        updatedAt: () => 'clock_timestamp()',
      })
      .andWhere('id = :id AND version = :version', { id, version })
      .execute();
    return result.affected === 1;
  }

  #select(): SelectQueryBuilder<ProjectEntity> {
    return this.#scope
      .select(ProjectEntity, 'p')
      .select('p.id', 'id')
      .addSelect('p.name', 'name')
      .addSelect('p.description', 'description')
      .addSelect('p.version', 'version')
      .addSelect('p.archivedAt', 'archivedAt')
      .addSelect('p.createdAt', 'createdAt')
      .addSelect('p.updatedAt', 'updatedAt')
      .addSelect(
        (count) =>
          count
            .select('count(*)')
            .from(ScenarioEntity, 's')
            .where('s.projectId = p.id AND s.workspaceId = p.workspaceId AND s.archivedAt IS NULL'),
        'scenarioCount',
      );
  }
}

function toProject(row: ProjectRow): ProjectRecord {
  return { ...row, scenarioCount: Number(row.scenarioCount) };
}
