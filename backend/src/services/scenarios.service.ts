import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import type { Page } from '#common/schemas/api/common.ts';
import { ConflictError, InvalidInputError, NotFoundError } from '#backend/domain/errors.ts';
import type { Member } from '#backend/domain/principal.ts';
import type { ListQuery, ScenarioRecord, ScenarioWithDocument } from '#backend/domain/records.types.ts';
import type { Database, Unit } from '#backend/persistence/database.ts';
import type { ScenarioSort } from '#backend/persistence/scenarios.repository.ts';
import type { ForecastService } from './forecast.service.ts';

/** A document to become the next revision of the version that was read. */
export interface NextRevision {
  version: number;
  document: Scenario;
  note: string;
  restoredFrom: number | null;
}

/** Scenarios: each save is a new revision, and the row keeps what lists show of the latest one. */
export class ScenariosService {
  readonly #database: Database;
  readonly #forecasts: ForecastService;

  constructor(database: Database, forecasts: ForecastService) {
    this.#database = database;
    this.#forecasts = forecasts;
  }

  /**
   * Lists the scenarios of a project.
   *
   * @param member who asks
   * @param projectId the project
   * @param query page, order and filters
   * @returns one page
   * @throws {NotFoundError} when the workspace has no such project
   */
  async list(member: Member, projectId: string, query: ListQuery<ScenarioSort>): Promise<Page<ScenarioRecord>> {
    const { projects, scenarios } = this.#database.workspace(member.workspaceId);
    if ((await projects.findById(projectId)) === null) throw new NotFoundError();
    return scenarios.listInProject(projectId, query);
  }

  /**
   * Reads a scenario with the document of its latest revision.
   *
   * @param member who asks
   * @param id of the scenario
   * @returns the scenario, archived or not
   * @throws {NotFoundError} when the workspace has no such scenario
   */
  async get(member: Member, id: string): Promise<ScenarioWithDocument> {
    const scenario = await this.#database.workspace(member.workspaceId).scenarios.findById(id);
    if (scenario === null) throw new NotFoundError();
    return scenario;
  }

  /**
   * Makes a scenario with its first revision.
   *
   * @param member who asks
   * @param projectId the project it belongs to
   * @param first document and note of revision 1
   * @returns the new scenario
   * @throws {NotFoundError} when the workspace has no such project
   */
  async create(
    member: Member,
    projectId: string,
    first: { document: Scenario; note: string },
  ): Promise<ScenarioWithDocument> {
    const forecast = this.#forecasts.summarise(first.document);
    return this.#database.transaction(async (unit) => {
      const { projects, scenarios, revisions } = unit.workspace(member.workspaceId);
      if ((await projects.findById(projectId)) === null) throw new NotFoundError();
      const head = { name: first.document.name, forecast, updatedById: member.userId };
      const scenarioId = await scenarios.create(projectId, head);
      await revisions.create({
        ...first,
        scenarioId,
        number: 1,
        authorId: member.userId,
        restoredFrom: null,
        forecast,
      });
      return getIn(unit, member, scenarioId);
    });
  }

  /**
   * Writes a new revision on top of the version that was read.
   *
   * @param member who saves
   * @param id of the scenario
   * @param next version read, document and note
   * @returns the scenario at its new revision
   * @throws {NotFoundError} when the workspace has no such scenario
   * @throws {ConflictError} when somebody else was faster; nothing is stored then
   */
  async save(member: Member, id: string, next: NextRevision): Promise<ScenarioWithDocument> {
    const { version, ...revision } = next;
    const forecast = this.#forecasts.summarise(next.document);
    return this.#database.transaction(async (unit) => {
      const { scenarios, revisions } = unit.workspace(member.workspaceId);
      const head = { name: next.document.name, forecast, updatedById: member.userId };
      const number = await scenarios.advanceIfVersion(id, version, head);
      if (number === null) throw new ConflictError({ kind: 'scenario', current: await getIn(unit, member, id) });
      await revisions.create({ ...revision, scenarioId: id, number, authorId: member.userId, forecast });
      return getIn(unit, member, id);
    });
  }

  /**
   * Hides a scenario or brings it back.
   *
   * @param member who asks
   * @param id of the scenario
   * @param change the version read, and whether it shall be archived
   * @returns the scenario
   * @throws {NotFoundError} when the workspace has no such scenario
   * @throws {ConflictError} when it was changed meanwhile
   */
  async archive(
    member: Member,
    id: string,
    change: { version: number; archived: boolean },
  ): Promise<ScenarioWithDocument> {
    return this.#database.transaction(async (unit) => {
      const { scenarios } = unit.workspace(member.workspaceId);
      const by = { archived: change.archived, by: member.userId };
      const isDone = await scenarios.archiveIfVersion(id, change.version, by);
      const current = await getIn(unit, member, id);
      if (!isDone) throw new ConflictError({ kind: 'scenario', current });
      return current;
    });
  }

  /**
   * Copies the latest document into a scenario of its own.
   *
   * @param member who asks
   * @param id of the scenario to copy
   * @param copy name of the copy, and its project when it is another one
   * @returns the copy
   * @throws {NotFoundError} when the workspace has no such scenario
   * @throws {InvalidInputError} when the workspace has no such project
   */
  async duplicate(
    member: Member,
    id: string,
    copy: { name: string; projectId?: string | undefined },
  ): Promise<ScenarioWithDocument> {
    const original = await this.get(member, id);
    const projectId = copy.projectId ?? original.projectId;
    if ((await this.#database.workspace(member.workspaceId).projects.findById(projectId)) === null) {
      throw new InvalidInputError([{ path: 'projectId', message: 'There is no project with this id.' }]);
    }
    const document = { ...original.document, name: copy.name };
    return this.create(member, projectId, {
      document,
      note: `Copied from “${original.name}”, revision ${original.revision}.`,
    });
  }
}

async function getIn(unit: Unit, member: Member, id: string): Promise<ScenarioWithDocument> {
  const scenario = await unit.workspace(member.workspaceId).scenarios.findById(id);
  if (scenario === null) throw new NotFoundError();
  return scenario;
}
