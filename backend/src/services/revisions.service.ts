import type { Forecast } from '#common/engine/forecast/forecast.types.ts';
import type { Page } from '#common/schemas/api/common.ts';
import type { Change } from '#common/schemas/api/scenarios.ts';
import { diffDocuments } from '#common/schemas/document-diff.ts';
import { InvalidInputError, NotFoundError } from '#backend/domain/errors.ts';
import type { Member } from '#backend/domain/principal.ts';
import type {
  ListQuery,
  RevisionRecord,
  RevisionWithDocument,
  ScenarioWithDocument,
} from '#backend/domain/records.types.ts';
import type { Database } from '#backend/persistence/database.ts';
import type { RevisionSort } from '#backend/persistence/revisions.repository.ts';
import type { ForecastService } from './forecast.service.ts';
import type { ScenariosService } from './scenarios.service.ts';

/** Saved states of a scenario: read, compared, restored, never changed. */
export class RevisionsService {
  readonly #database: Database;
  readonly #scenarios: ScenariosService;
  readonly #forecasts: ForecastService;

  constructor(database: Database, scenarios: ScenariosService, forecasts: ForecastService) {
    this.#database = database;
    this.#scenarios = scenarios;
    this.#forecasts = forecasts;
  }

  /**
   * Lists the revisions of a scenario.
   *
   * @param member who asks
   * @param scenarioId the scenario
   * @param query page, order and text in the note
   * @returns one page
   * @throws {NotFoundError} when the workspace has no such scenario
   */
  async list(member: Member, scenarioId: string, query: ListQuery<RevisionSort>): Promise<Page<RevisionRecord>> {
    await this.#scenarios.get(member, scenarioId);
    return this.#database.workspace(member.workspaceId).revisions.listOfScenario(scenarioId, query);
  }

  /**
   * Reads one revision with its document.
   *
   * @param member who asks
   * @param scenarioId the scenario
   * @param number of the revision, from 1
   * @returns the revision
   * @throws {NotFoundError} when there is no such revision
   */
  async get(member: Member, scenarioId: string, number: number): Promise<RevisionWithDocument> {
    const revision = await this.#database.workspace(member.workspaceId).revisions.find(scenarioId, number);
    if (revision === null) throw new NotFoundError();
    return revision;
  }

  /**
   * Makes a new revision with the document of an earlier one.
   *
   * @param member who asks
   * @param scenarioId the scenario
   * @param number of the revision to take back
   * @param restore version of the scenario that was read, and a note
   * @returns the scenario at its new revision
   * @throws {NotFoundError} when there is no such revision
   * @throws {ConflictError} when the scenario was changed meanwhile
   */
  async restore(
    member: Member,
    scenarioId: string,
    number: number,
    restore: { version: number; note: string },
  ): Promise<ScenarioWithDocument> {
    const { document } = await this.get(member, scenarioId, number);
    return this.#scenarios.save(member, scenarioId, { ...restore, document, restoredFrom: number });
  }

  /**
   * What changed between two revisions.
   *
   * @param member who asks
   * @param scenarioId the scenario
   * @param between numbers of the earlier and the later revision, in any order
   * @returns the changes, in the order of the document
   * @throws {NotFoundError} when the workspace has no such scenario
   * @throws {InvalidInputError} when the scenario has no such revision
   */
  async diff(member: Member, scenarioId: string, between: { from: number; to: number }): Promise<Change[]> {
    await this.#scenarios.get(member, scenarioId);
    const { revisions } = this.#database.workspace(member.workspaceId);
    const from = await revisions.find(scenarioId, between.from);
    const to = await revisions.find(scenarioId, between.to);
    if (from === null || to === null) {
      const missing = (['from', 'to'] as const).filter((end) => (end === 'from' ? from : to) === null);
      throw new InvalidInputError(
        missing.map((path) => ({ path, message: `There is no revision ${between[path]} of this scenario.` })),
      );
    }
    return diffDocuments(from.document, to.document);
  }

  /**
   * Computes the forecast of a stored revision.
   *
   * @param member who asks
   * @param scenarioId the scenario
   * @param number of the revision
   * @returns the forecast with its ledger
   * @throws {NotFoundError} when there is no such revision
   * @throws {InvalidInputError} with every problem when its node cannot run
   */
  async forecast(member: Member, scenarioId: string, number: number): Promise<Forecast> {
    const { document } = await this.get(member, scenarioId, number);
    return this.#forecasts.compute(document, '');
  }
}
