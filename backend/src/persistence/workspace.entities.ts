import { Check, Column, Entity, ForeignKey, Index, PrimaryColumn, Unique } from 'typeorm';
import type { Outcome } from '#common/engine/forecast/forecast.types.ts';
import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import type { LibraryContent, LibraryKind } from '#common/schemas/api/library.ts';
import { MembershipEntity, WorkspaceEntity } from './accounts.entities.ts';

/** Not `now()`, which stands still during a transaction: rows made in one keep their order. */
const now = () => 'clock_timestamp()';
/** Orders by `lower(name)` need expression indexes, which the schema builder cannot describe: made by the migration alone. */
const byMigration = { synchronize: false } as const;

/** Each of these rows names its workspace, and every foreign key carries it: none can point into another workspace. */
export interface WorkspaceOwned {
  workspaceId: string;
}

@Entity('projects')
@Unique('projects_id_workspace_key', ['id', 'workspaceId'])
@Check('projects_name_check', "name <> ''")
@Check('projects_version_check', 'version > 0')
@Index('projects_name_idx', byMigration)
@Index('projects_updated_idx', ['workspaceId', 'updatedAt', 'id'])
@Index('projects_created_idx', ['workspaceId', 'createdAt', 'id'])
@ForeignKey<WorkspaceEntity, ['workspaceId']>(() => WorkspaceEntity, ['workspaceId'], ['id'], {
  name: 'projects_workspace_fkey',
})
export class ProjectEntity implements WorkspaceOwned {
  @PrimaryColumn({ type: 'uuid', primaryKeyConstraintName: 'projects_pkey' })
  id!: string;

  @Column({ type: 'uuid', name: 'workspace_id' })
  workspaceId!: string;

  @Column('text')
  name!: string;

  @Column({ type: 'text', default: '' })
  description!: string;

  @Column({ type: 'integer', default: 1 })
  version!: number;

  @Column({ type: 'timestamptz', name: 'archived_at', nullable: true })
  archivedAt!: Date | null;

  @Column({ type: 'timestamptz', name: 'created_at', default: now })
  createdAt!: Date;

  @Column({ type: 'timestamptz', name: 'updated_at', default: now })
  updatedAt!: Date;
}

/** What lists show of a forecast, the same columns in scenarios and revisions; all null when it cannot be computed. */
export class ForecastColumns {
  @Column({ type: 'text', name: 'engine_version', nullable: true })
  engineVersion!: string | null;

  @Column({ type: 'text', nullable: true })
  outcome!: Outcome | null;

  @Column({ type: 'double precision', name: 'life_s', nullable: true })
  lifeS!: number | null;

  @Column({ type: 'integer', name: 'end_month', nullable: true })
  endMonth!: number | null;

  @Column({ type: 'double precision', name: 'target_life_s', nullable: true })
  targetLifeS!: number | null;
}

@Entity('scenarios')
@Unique('scenarios_id_workspace_key', ['id', 'workspaceId'])
@Check('scenarios_name_check', "name <> ''")
@Check('scenarios_version_check', 'version > 0 AND current_revision > 0')
@Index('scenarios_name_idx', byMigration)
@Index('scenarios_updated_idx', ['workspaceId', 'projectId', 'updatedAt', 'id'])
@Index('scenarios_life_idx', ['workspaceId', 'projectId', 'lifeOrderS', 'id'])
@ForeignKey<ProjectEntity, ['projectId', 'workspaceId']>(
  () => ProjectEntity,
  ['projectId', 'workspaceId'],
  ['id', 'workspaceId'],
  { name: 'scenarios_project_fkey' },
)
@ForeignKey<MembershipEntity, ['workspaceId', 'updatedById']>(
  () => MembershipEntity,
  ['workspaceId', 'updatedById'],
  ['workspaceId', 'userId'],
  { name: 'scenarios_updated_by_fkey' },
)
@ForeignKey<RevisionEntity, ['id', 'currentRevision']>(
  () => RevisionEntity,
  ['id', 'currentRevision'],
  ['scenarioId', 'number'],
  { name: 'scenarios_current_revision_fkey', deferrable: 'INITIALLY DEFERRED' },
)
export class ScenarioEntity extends ForecastColumns implements WorkspaceOwned {
  @PrimaryColumn({ type: 'uuid', primaryKeyConstraintName: 'scenarios_pkey' })
  id!: string;

  @Column({ type: 'uuid', name: 'workspace_id' })
  workspaceId!: string;

  @Column({ type: 'uuid', name: 'project_id' })
  projectId!: string;

  @Column('text')
  name!: string;

  @Column({ type: 'integer', default: 1 })
  version!: number;

  @Column({ type: 'integer', name: 'current_revision', default: 1 })
  currentRevision!: number;

  /** Life for sorting, s: infinite when it outlives the horizon, 0 when oversubscribed, null without forecast. */
  @Column({ type: 'double precision', name: 'life_order_s', nullable: true })
  lifeOrderS!: number | null;

  @Column({ type: 'timestamptz', name: 'archived_at', nullable: true })
  archivedAt!: Date | null;

  @Column({ type: 'timestamptz', name: 'created_at', default: now })
  createdAt!: Date;

  @Column({ type: 'timestamptz', name: 'updated_at', default: now })
  updatedAt!: Date;

  @Column({ type: 'uuid', name: 'updated_by' })
  updatedById!: string;
}

/** Never changed once written: a trigger refuses it. */
@Entity('revisions')
@Check('revisions_number_check', 'number > 0 AND restored_from < number')
@ForeignKey<ScenarioEntity, ['scenarioId', 'workspaceId']>(
  () => ScenarioEntity,
  ['scenarioId', 'workspaceId'],
  ['id', 'workspaceId'],
  { name: 'revisions_scenario_fkey' },
)
@ForeignKey<MembershipEntity, ['workspaceId', 'authorId']>(
  () => MembershipEntity,
  ['workspaceId', 'authorId'],
  ['workspaceId', 'userId'],
  { name: 'revisions_author_fkey' },
)
@ForeignKey<RevisionEntity, ['scenarioId', 'restoredFrom']>(
  () => RevisionEntity,
  ['scenarioId', 'restoredFrom'],
  ['scenarioId', 'number'],
  { name: 'revisions_restored_from_fkey' },
)
export class RevisionEntity extends ForecastColumns implements WorkspaceOwned {
  @PrimaryColumn({ type: 'uuid', name: 'scenario_id', primaryKeyConstraintName: 'revisions_pkey' })
  scenarioId!: string;

  @PrimaryColumn({ type: 'integer', primaryKeyConstraintName: 'revisions_pkey' })
  number!: number;

  @Column({ type: 'uuid', name: 'workspace_id' })
  workspaceId!: string;

  @Column('jsonb')
  document!: Scenario;

  @Column({ type: 'text', default: '' })
  note!: string;

  @Column({ type: 'uuid', name: 'author_id' })
  authorId!: string;

  @Column({ type: 'integer', name: 'restored_from', nullable: true })
  restoredFrom!: number | null;

  @Column({ type: 'timestamptz', name: 'created_at', default: now })
  createdAt!: Date;
}

@Entity('library_items')
@Check('library_items_kind_check', "kind IN ('part', 'cell', 'climate')")
@Check('library_items_name_check', "name <> ''")
@Check('library_items_version_check', 'version > 0')
@Index('library_items_name_idx', byMigration)
@Index('library_items_updated_idx', ['workspaceId', 'updatedAt', 'id'])
@ForeignKey<MembershipEntity, ['workspaceId', 'updatedById']>(
  () => MembershipEntity,
  ['workspaceId', 'updatedById'],
  ['workspaceId', 'userId'],
  { name: 'library_items_updated_by_fkey' },
)
export class LibraryItemEntity implements WorkspaceOwned {
  @PrimaryColumn({ type: 'uuid', primaryKeyConstraintName: 'library_items_pkey' })
  id!: string;

  @Column({ type: 'uuid', name: 'workspace_id' })
  workspaceId!: string;

  @Column('text')
  kind!: LibraryKind;

  @Column('text')
  name!: string;

  @Column({ type: 'text', default: '' })
  note!: string;

  @Column('jsonb')
  content!: LibraryContent;

  @Column({ type: 'integer', default: 1 })
  version!: number;

  @Column({ type: 'timestamptz', name: 'archived_at', nullable: true })
  archivedAt!: Date | null;

  @Column({ type: 'timestamptz', name: 'created_at', default: now })
  createdAt!: Date;

  @Column({ type: 'timestamptz', name: 'updated_at', default: now })
  updatedAt!: Date;

  @Column({ type: 'uuid', name: 'updated_by' })
  updatedById!: string;
}
