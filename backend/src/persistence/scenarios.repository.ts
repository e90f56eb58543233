import { randomUUID } from 'node:crypto';
import type { SelectQueryBuilder } from 'typeorm';
import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import type { Page } from '#common/schemas/api/common.ts';
import type { ForecastSummary } from '#common/schemas/api/scenarios.ts';
import type { ListQuery, ScenarioRecord, ScenarioWithDocument } from '#backend/domain/records.types.ts';
import { UserEntity } from './accounts.entities.ts';
import { fromForecastRow, lifeOrderS, toForecastRow, type ForecastRow } from './forecast-columns.ts';
import { filterList, orderList, readPage } from './listing.ts';
import { returnedNumber } from './returned.ts';
import { ProjectEntity, RevisionEntity, ScenarioEntity } from './workspace.entities.ts';
import type { WorkspaceScope } from './workspace-scope.ts';

export type ScenarioSort = 'name' | '-name' | 'updatedAt' | '-updatedAt' | 'life' | '-life';

/** What a new revision changes in the scenario's row. */
export interface ScenarioHead {
  name: string;
  forecast: ForecastSummary | null;
  updatedById: string;
}

type ScenarioRow = Omit<ScenarioRecord, 'forecast'> & ForecastRow;
type DetailRow = ScenarioRow & { projectName: string; document: Scenario };

export class ScenariosRepository {
  readonly #scope: WorkspaceScope;

  constructor(scope: WorkspaceScope) {
    this.#scope = scope;
  }

  async listInProject(projectId: string, query: ListQuery<ScenarioSort>): Promise<Page<ScenarioRecord>> {
    const builder = filterList(this.#select().andWhere('s.projectId = :projectId', { projectId }), 's', query);
    orderList(
      builder,
      query.sort,
      { name: 'lower(s.name) COLLATE "C"', updatedAt: 's.updatedAt', life: 's.lifeOrderS' },
      's.id',
    );
    const { rows, total } = await readPage<ScenarioRow>(builder, query);
    return { items: rows.map(toScenario), page: query.page, pageSize: query.pageSize, total };
  }

  /** The scenario with the document of its latest revision. */
  async findById(id: string): Promise<ScenarioWithDocument | null> {
    const row = await this.#select()
      .innerJoin(ProjectEntity, 'p', 'p.id = s.projectId AND p.workspaceId = s.workspaceId')
      .innerJoin(RevisionEntity, 'r', 'r.scenarioId = s.id AND r.number = s.currentRevision')
      .addSelect('p.name', 'projectName')
      .addSelect('r.document', 'document')
      .andWhere('s.id = :id', { id })
      .getRawOne<DetailRow>();
    if (row === undefined) return null;
    return { ...toScenario(row), projectName: row.projectName, document: row.document };
  }

  /** Inserts the row at revision 1; the revision itself must follow in the same transaction. */
  async create(projectId: string, { forecast, ...head }: ScenarioHead): Promise<string> {
    const id = randomUUID();
    await this.#scope.insert(ScenarioEntity, (workspaceId) => ({
      id,
      workspaceId,
      projectId,
      ...head,
      ...toForecastRow(forecast),
      lifeOrderS: lifeOrderS(forecast),
    }));
    return id;
  }

  /**
   * Takes the next revision number if the row still has this version, and holds the row until the transaction ends.
   * Null: it is gone, or somebody else was faster.
   */
  async advanceIfVersion(id: string, version: number, { forecast, ...head }: ScenarioHead): Promise<number | null> {
    const result = await this.#scope
      .update(ScenarioEntity, {
        ...head,
        ...toForecastRow(forecast),
        lifeOrderS: lifeOrderS(forecast),
        version: () => 'version + 1',
        currentRevision: () => 'current_revision + 1',
        updatedAt: () => 'clock_timestamp()',
      })
      .andWhere('id = :id AND version = :version', { id, version })
      .returning('current_revision')
      .execute();
    return returnedNumber(result.raw, 'current_revision');
  }

  async archiveIfVersion(id: string, version: number, change: { archived: boolean; by: string }): Promise<boolean> {
    const result = await this.#scope
      .update(ScenarioEntity, {
        archivedAt: change.archived ? () => 'COALESCE(archived_at, now())' : null,
        version: () => 'version + 1',
        updatedAt: () => 'clock_timestamp()',
        updatedById: change.by,
      })
      .andWhere('id = :id AND version = :version', { id, version })
      .execute();
    return result.affected === 1;
  }

  #select(): SelectQueryBuilder<ScenarioEntity> {
    return this.#scope
      .select(ScenarioEntity, 's')
      .innerJoin(UserEntity, 'u', 'u.id = s.updatedById')
      .select('s.id', 'id')
      .addSelect('s.projectId', 'projectId')
      .addSelect('s.name', 'name')
      .addSelect('s.version', 'version')
      .addSelect('s.currentRevision', 'revision')
      .addSelect('s.engineVersion', 'engineVersion')
      .addSelect('s.outcome', 'outcome')
      .addSelect('s.lifeS', 'lifeS')
      .addSelect('s.endMonth', 'endMonth')
      .addSelect('s.targetLifeS', 'targetLifeS')
      .addSelect('s.archivedAt', 'archivedAt')
      .addSelect('s.createdAt', 'createdAt')
      .addSelect('s.updatedAt', 'updatedAt')
      .addSelect('u.name', 'updatedBy');
  }
}

function toScenario(row: ScenarioRow): ScenarioRecord {
  const { id, projectId, name, version, revision, archivedAt, createdAt, updatedAt, updatedBy } = row;
  const forecast = fromForecastRow(row);
  return { id, projectId, name, version, revision, forecast, archivedAt, createdAt, updatedAt, updatedBy };
}
