import type { Page } from '#common/schemas/api/common.ts';
import { ConflictError, NotFoundError } from '#backend/domain/errors.ts';
import type { Member } from '#backend/domain/principal.ts';
import type { ListQuery, ProjectRecord } from '#backend/domain/records.types.ts';
import type { Database } from '#backend/persistence/database.ts';
import type { ProjectChanges, ProjectSort } from '#backend/persistence/projects.repository.ts';

export class ProjectsService {
  readonly #database: Database;

  constructor(database: Database) {
    this.#database = database;
  }

  /**
   * Lists the workspace's projects.
   *
   * @param member who asks
   * @param query page, order and filters
   * @returns one page
   */
  async list(member: Member, query: ListQuery<ProjectSort>): Promise<Page<ProjectRecord>> {
    return this.#database.workspace(member.workspaceId).projects.list(query);
  }

  /**
   * Reads one project.
   *
   * @param member who asks
   * @param id of the project
   * @returns the project, archived or not
   * @throws {NotFoundError} when the workspace has no such project
   */
  async get(member: Member, id: string): Promise<ProjectRecord> {
    const project = await this.#database.workspace(member.workspaceId).projects.findById(id);
    if (project === null) throw new NotFoundError();
    return project;
  }

  /**
   * Makes a project.
   *
   * @param member who asks
   * @param project its name and description
   * @returns the new project
   */
  async create(member: Member, project: { name: string; description: string }): Promise<ProjectRecord> {
    return this.get(member, await this.#database.workspace(member.workspaceId).projects.create(project));
  }

  /**
   * Changes name, description or archive state of the version that was read.
   *
   * @param member who asks
   * @param id of the project
   * @param change the version read, and the fields to change
   * @returns the changed project
   * @throws {NotFoundError} when the workspace has no such project
   * @throws {ConflictError} when it was changed meanwhile; nothing is stored then
   */
  async update(member: Member, id: string, change: { version: number } & ProjectChanges): Promise<ProjectRecord> {
    const { version, ...changes } = change;
    return this.#database.transaction(async (unit) => {
      const { projects } = unit.workspace(member.workspaceId);
      const isDone = await projects.updateIfVersion(id, version, changes);
      const current = await projects.findById(id);
      if (current === null) throw new NotFoundError();
      if (!isDone) throw new ConflictError({ kind: 'project', current });
      return current;
    });
  }
}
