import { randomUUID } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import type { Role } from '#common/schemas/api/common.ts';
import type { UserRecord, WorkspaceMembership } from '#backend/domain/records.types.ts';
import { MembershipEntity, UserEntity, WorkspaceEntity } from './accounts.entities.ts';
import { returnedNumber } from './returned.ts';

const USER_COLUMNS = { id: true, email: true, name: true, sessionEpoch: true } as const;

/** Users, workspaces and who is member of which. Belongs to no workspace, therefore outside the workspace scope. */
export class AccountsRepository {
  readonly #manager: EntityManager;

  constructor(manager: EntityManager) {
    this.#manager = manager;
  }

  async countUsers(): Promise<number> {
    return this.#manager.countBy(UserEntity, {});
  }

  async findUser(id: string): Promise<UserRecord | null> {
    return this.#manager.findOne(UserEntity, { where: { id }, select: USER_COLUMNS });
  }

  /** The user with the stored hash; only for checking a password. */
  async findUserForSignIn(email: string): Promise<(UserRecord & { passwordHash: string }) | null> {
    return this.#manager.findOne(UserEntity, {
      where: { email: email.toLowerCase() },
      select: { ...USER_COLUMNS, passwordHash: true },
    });
  }

  /** Workspaces that the user is a member of now, the oldest membership first. */
  async listWorkspaces(userId: string): Promise<WorkspaceMembership[]> {
    return this.#manager
      .createQueryBuilder(MembershipEntity, 'm')
      .innerJoin(WorkspaceEntity, 'w', 'w.id = m.workspaceId')
      .select('w.id', 'id')
      .addSelect('w.name', 'name')
      .addSelect('w.isDemo', 'isDemo')
      .addSelect('m.role', 'role')
      .where('m.userId = :userId AND m.removedAt IS NULL', { userId })
      .orderBy('m.createdAt')
      .addOrderBy('w.id')
      .getRawMany<WorkspaceMembership>();
  }

  async hasDemo(): Promise<boolean> {
    return this.#manager.existsBy(WorkspaceEntity, { isDemo: true });
  }

  async createUser(user: { email: string; name: string; passwordHash: string }): Promise<string> {
    const id = randomUUID();
    await this.#manager.insert(UserEntity, { ...user, id, email: user.email.toLowerCase() });
    return id;
  }

  async createWorkspace(workspace: { name: string; isDemo: boolean }): Promise<string> {
    const id = randomUUID();
    await this.#manager.insert(WorkspaceEntity, { ...workspace, id });
    return id;
  }

  async addMember(workspaceId: string, userId: string, role: Role): Promise<void> {
    await this.#manager.insert(MembershipEntity, { workspaceId, userId, role });
  }

  /** Stores a new hash and ends every session made before; null when the old hash is not the stored one any more. */
  async replacePassword(userId: string, from: string, to: string): Promise<number | null> {
    const result = await this.#manager
      .createQueryBuilder()
      .update(UserEntity)
      .set({ passwordHash: to, sessionEpoch: () => 'session_epoch + 1', updatedAt: () => 'now()' })
      .where('id = :userId AND password_hash = :from', { userId, from })
      .returning('session_epoch')
      .execute();
    return returnedNumber(result.raw, 'session_epoch');
  }
}
