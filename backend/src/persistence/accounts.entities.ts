import { Check, Column, Entity, ForeignKey, Index, PrimaryColumn, Unique } from 'typeorm';
import type { Role } from '#common/schemas/api/common.ts';

const now = () => 'now()';

@Entity('users')
@Unique('users_email_key', ['email'])
@Check('users_email_lower_check', 'email = lower(email)')
export class UserEntity {
  @PrimaryColumn({ type: 'uuid', primaryKeyConstraintName: 'users_pkey' })
  id!: string;

  @Column('text')
  email!: string;

  @Column('text')
  name!: string;

  @Column({ type: 'text', name: 'password_hash', select: false })
  passwordHash!: string;

  @Column({ type: 'integer', name: 'session_epoch', default: 1 })
  sessionEpoch!: number;

  @Column({ type: 'timestamptz', name: 'created_at', default: now })
  createdAt!: Date;

  @Column({ type: 'timestamptz', name: 'updated_at', default: now })
  updatedAt!: Date;
}

@Entity('workspaces')
export class WorkspaceEntity {
  @PrimaryColumn({ type: 'uuid', primaryKeyConstraintName: 'workspaces_pkey' })
  id!: string;

  @Column('text')
  name!: string;

  @Column({ type: 'boolean', name: 'is_demo', default: false })
  isDemo!: boolean;

  @Column({ type: 'timestamptz', name: 'created_at', default: now })
  createdAt!: Date;
}

/** Rows stay when a member leaves, so that their work keeps its author. */
@Entity('memberships')
@Index('memberships_user_idx', ['userId'])
@Check('memberships_role_check', "role IN ('owner', 'engineer', 'sales', 'viewer')")
@ForeignKey<WorkspaceEntity, ['workspaceId']>(() => WorkspaceEntity, ['workspaceId'], ['id'], {
  name: 'memberships_workspace_fkey',
})
@ForeignKey<UserEntity, ['userId']>(() => UserEntity, ['userId'], ['id'], { name: 'memberships_user_fkey' })
export class MembershipEntity {
  @PrimaryColumn({ type: 'uuid', name: 'workspace_id', primaryKeyConstraintName: 'memberships_pkey' })
  workspaceId!: string;

  @PrimaryColumn({ type: 'uuid', name: 'user_id', primaryKeyConstraintName: 'memberships_pkey' })
  userId!: string;

  @Column('text')
  role!: Role;

  @Column({ type: 'timestamptz', name: 'created_at', default: now })
  createdAt!: Date;

  @Column({ type: 'timestamptz', name: 'removed_at', nullable: true })
  removedAt!: Date | null;
}

/** Rows of connect-pg-simple; only the session store reads and writes them. */
@Entity('sessions')
@Index('sessions_expire_idx', ['expire'])
export class SessionEntity {
  @PrimaryColumn({ type: 'text', primaryKeyConstraintName: 'sessions_pkey' })
  sid!: string;

  @Column('jsonb')
  sess!: object;

  @Column('timestamptz')
  expire!: Date;
}

@Entity('setup_tokens')
export class SetupTokenEntity {
  /** SHA-256 of the token, hexadecimal: the token itself is nowhere but in the start log. */
  @PrimaryColumn({ type: 'text', name: 'token_hash', primaryKeyConstraintName: 'setup_tokens_pkey' })
  tokenHash!: string;

  @Column({ type: 'timestamptz', name: 'expires_at' })
  expiresAt!: Date;

  @Column({ type: 'timestamptz', name: 'used_at', nullable: true })
  usedAt!: Date | null;
}

@Entity('sign_in_attempts')
@Index('sign_in_attempts_account_idx', ['accountKey', 'at'])
@Index('sign_in_attempts_address_idx', ['address', 'at'])
@Index('sign_in_attempts_at_idx', ['at'])
export class SignInAttemptEntity {
  @PrimaryColumn({ type: 'uuid', primaryKeyConstraintName: 'sign_in_attempts_pkey' })
  id!: string;

  /** Keyed hash of the address typed, so that mistyped passwords in the e-mail field are not kept. */
  @Column({ type: 'text', name: 'account_key' })
  accountKey!: string;

  @Column('text')
  address!: string;

  /** False until the password has proved right: attempts under way count as failures. */
  @Column({ type: 'boolean', default: false })
  succeeded!: boolean;

  @Column({ type: 'timestamptz', default: now })
  at!: Date;
}
