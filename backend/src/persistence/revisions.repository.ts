import type { SelectQueryBuilder } from 'typeorm';
import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import type { Page } from '#common/schemas/api/common.ts';
import type { ForecastSummary } from '#common/schemas/api/scenarios.ts';
import type { ListQuery, RevisionRecord, RevisionWithDocument } from '#backend/domain/records.types.ts';
import { UserEntity } from './accounts.entities.ts';
import { fromForecastRow, toForecastRow, type ForecastRow } from './forecast-columns.ts';
import { containsPattern, orderList, readPage } from './listing.ts';
import { RevisionEntity } from './workspace.entities.ts';
import type { WorkspaceScope } from './workspace-scope.ts';

export type RevisionSort = 'revision' | '-revision';

export interface NewRevision {
  scenarioId: string;
  number: number;
  document: Scenario;
  note: string;
  authorId: string;
  restoredFrom: number | null;
  forecast: ForecastSummary | null;
}

type RevisionRow = Omit<RevisionRecord, 'forecast'> & ForecastRow;

export class RevisionsRepository {
  readonly #scope: WorkspaceScope;

  constructor(scope: WorkspaceScope) {
    this.#scope = scope;
  }

  /** Revisions of a scenario; the text is looked for in their notes. */
  async listOfScenario(
    scenarioId: string,
    query: Pick<ListQuery<RevisionSort>, 'page' | 'pageSize' | 'sort' | 'q'>,
  ): Promise<Page<RevisionRecord>> {
    const builder = this.#select().andWhere('r.scenarioId = :scenarioId', { scenarioId });
    if (query.q !== '') builder.andWhere('r.note ILIKE :pattern', { pattern: containsPattern(query.q) });
    orderList(builder, query.sort, { revision: 'r.number' }, 'r.scenarioId');
    const { rows, total } = await readPage<RevisionRow>(builder, query);
    return { items: rows.map(toRevision), page: query.page, pageSize: query.pageSize, total };
  }

  async find(scenarioId: string, number: number): Promise<RevisionWithDocument | null> {
    const row = await this.#select()
      .addSelect('r.document', 'document')
      .andWhere('r.scenarioId = :scenarioId AND r.number = :number', { scenarioId, number })
      .getRawOne<RevisionRow & { document: Scenario }>();
    return row ? { ...toRevision(row), document: row.document } : null;
  }

  async create({ forecast, ...revision }: NewRevision): Promise<void> {
    await this.#scope.insert(RevisionEntity, (workspaceId) => ({
      workspaceId,
      ...revision,
      ...toForecastRow(forecast),
    }));
  }

  #select(): SelectQueryBuilder<RevisionEntity> {
    return this.#scope
      .select(RevisionEntity, 'r')
      .innerJoin(UserEntity, 'u', 'u.id = r.authorId')
      .select('r.scenarioId', 'scenarioId')
      .addSelect('r.number', 'revision')
      .addSelect('r.note', 'note')
      .addSelect('u.name', 'author')
      .addSelect('r.createdAt', 'createdAt')
      .addSelect('r.restoredFrom', 'restoredFrom')
      .addSelect('r.engineVersion', 'engineVersion')
      .addSelect('r.outcome', 'outcome')
      .addSelect('r.lifeS', 'lifeS')
      .addSelect('r.endMonth', 'endMonth')
      .addSelect('r.targetLifeS', 'targetLifeS');
  }
}

function toRevision(row: RevisionRow): RevisionRecord {
  const { scenarioId, revision, note, author, createdAt, restoredFrom } = row;
  return { scenarioId, revision, note, author, createdAt, restoredFrom, forecast: fromForecastRow(row) };
}
