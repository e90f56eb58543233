import type {
  DeepPartial,
  EntityManager,
  EntityTarget,
  ObjectLiteral,
  QueryDeepPartialEntity,
  SelectQueryBuilder,
  UpdateQueryBuilder,
} from 'typeorm';
import type { WorkspaceOwned } from './workspace.entities.ts';

const UUID = /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/;

/**
 * The one place that ties queries to a workspace. Repositories of workspace data can only be made from a scope and reach
 * the database only through it. Conditions are added with `andWhere`; `where` would drop the scope and therefore throws.
 */
export class WorkspaceScope {
  readonly #manager: EntityManager;
  readonly #workspaceId: string;

  constructor(manager: EntityManager, workspaceId: string) {
    if (!UUID.test(workspaceId)) throw new TypeError('A scope needs the id of a workspace.');
    this.#manager = manager;
    this.#workspaceId = workspaceId;
  }

  select<E extends ObjectLiteral & WorkspaceOwned>(entity: EntityTarget<E>, alias: string): SelectQueryBuilder<E> {
    const builder = this.#manager.createQueryBuilder(entity, alias);
    return sealed(builder.where(`${alias}.workspaceId = :scope`, { scope: this.#workspaceId }));
  }

  update<E extends ObjectLiteral & WorkspaceOwned>(
    entity: EntityTarget<E>,
    changes: QueryDeepPartialEntity<E>,
  ): UpdateQueryBuilder<E> {
    const builder = this.#manager.createQueryBuilder().update(entity).set(changes);
    return sealed(builder.where('workspace_id = :scope', { scope: this.#workspaceId }));
  }

  /** Inserts a row; the workspace is handed in so that it cannot be forgotten or invented. */
  async insert<E extends ObjectLiteral & WorkspaceOwned>(
    entity: EntityTarget<E>,
    row: (workspaceId: string) => DeepPartial<E>,
  ): Promise<void> {
    const repository = this.#manager.getRepository(entity);
    const made = repository.create(row(this.#workspaceId));
    if (made.workspaceId !== this.#workspaceId) throw new TypeError('The row names another workspace than its scope.');
    await repository.insert(made);
  }
}

/** Takes away the methods that would drop or widen the condition on the workspace. */
function sealed<B extends object>(builder: B): B {
  const refuse = (): never => {
    throw new TypeError('where and orWhere would drop the workspace: use andWhere.');
  };
  return Object.assign(builder, { where: refuse, orWhere: refuse });
}
