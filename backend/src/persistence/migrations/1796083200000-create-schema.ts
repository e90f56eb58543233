import type { MigrationInterface, QueryRunner } from 'typeorm';

const ACCOUNTS = `
  CREATE TABLE users (
    id uuid CONSTRAINT users_pkey PRIMARY KEY,
    email text NOT NULL CONSTRAINT users_email_key UNIQUE CONSTRAINT users_email_lower_check CHECK (email = lower(email)),
    name text NOT NULL,
    password_hash text NOT NULL,
    session_epoch integer NOT NULL DEFAULT 1,
    created_at timestamptz NOT NULL DEFAULT now(),
    updated_at timestamptz NOT NULL DEFAULT now()
  );
  CREATE TABLE workspaces (
    id uuid CONSTRAINT workspaces_pkey PRIMARY KEY,
    name text NOT NULL,
    is_demo boolean NOT NULL DEFAULT false,
    created_at timestamptz NOT NULL DEFAULT now()
  );
  CREATE TABLE memberships (
    workspace_id uuid NOT NULL CONSTRAINT memberships_workspace_fkey REFERENCES workspaces (id),
    user_id uuid NOT NULL CONSTRAINT memberships_user_fkey REFERENCES users (id),
    role text NOT NULL CONSTRAINT memberships_role_check CHECK (role IN ('owner', 'engineer', 'sales', 'viewer')),
    created_at timestamptz NOT NULL DEFAULT now(),
    removed_at timestamptz,
    CONSTRAINT memberships_pkey PRIMARY KEY (workspace_id, user_id)
  );
  CREATE INDEX memberships_user_idx ON memberships (user_id);
  CREATE TABLE sessions (
    sid text CONSTRAINT sessions_pkey PRIMARY KEY,
    sess jsonb NOT NULL,
    expire timestamptz NOT NULL
  );
  CREATE INDEX sessions_expire_idx ON sessions (expire);
  CREATE TABLE setup_tokens (
    token_hash text CONSTRAINT setup_tokens_pkey PRIMARY KEY,
    expires_at timestamptz NOT NULL,
    used_at timestamptz
  );
  CREATE TABLE sign_in_attempts (
    id uuid CONSTRAINT sign_in_attempts_pkey PRIMARY KEY,
    account_key text NOT NULL,
    address text NOT NULL,
    succeeded boolean NOT NULL DEFAULT false,
    at timestamptz NOT NULL DEFAULT now()
  );
  CREATE INDEX sign_in_attempts_account_idx ON sign_in_attempts (account_key, at);
  CREATE INDEX sign_in_attempts_address_idx ON sign_in_attempts (address, at);
  CREATE INDEX sign_in_attempts_at_idx ON sign_in_attempts (at);
`;

const WORKSPACE_DATA = `
  CREATE TABLE projects (
    id uuid CONSTRAINT projects_pkey PRIMARY KEY,
    workspace_id uuid NOT NULL CONSTRAINT projects_workspace_fkey REFERENCES workspaces (id),
    name text NOT NULL CONSTRAINT projects_name_check CHECK (name <> ''),
    description text NOT NULL DEFAULT '',
    version integer NOT NULL DEFAULT 1 CONSTRAINT projects_version_check CHECK (version > 0),
    archived_at timestamptz,
    created_at timestamptz NOT NULL DEFAULT clock_timestamp(),
    updated_at timestamptz NOT NULL DEFAULT clock_timestamp(),
    CONSTRAINT projects_id_workspace_key UNIQUE (id, workspace_id)
  );
  CREATE INDEX projects_name_idx ON projects (workspace_id, (lower(name) COLLATE "C"), id);
  CREATE INDEX projects_updated_idx ON projects (workspace_id, updated_at, id);
  CREATE INDEX projects_created_idx ON projects (workspace_id, created_at, id);
  CREATE TABLE scenarios (
    id uuid CONSTRAINT scenarios_pkey PRIMARY KEY,
    workspace_id uuid NOT NULL,
    project_id uuid NOT NULL,
    name text NOT NULL CONSTRAINT scenarios_name_check CHECK (name <> ''),
    version integer NOT NULL DEFAULT 1,
    current_revision integer NOT NULL DEFAULT 1,
    engine_version text,
    outcome text,
    life_s double precision,
    end_month integer,
    target_life_s double precision,
    life_order_s double precision,
    archived_at timestamptz,
    created_at timestamptz NOT NULL DEFAULT clock_timestamp(),
    updated_at timestamptz NOT NULL DEFAULT clock_timestamp(),
    updated_by uuid NOT NULL,
    CONSTRAINT scenarios_version_check CHECK (version > 0 AND current_revision > 0),
    CONSTRAINT scenarios_id_workspace_key UNIQUE (id, workspace_id),
    CONSTRAINT scenarios_project_fkey FOREIGN KEY (project_id, workspace_id) REFERENCES projects (id, workspace_id),
    CONSTRAINT scenarios_updated_by_fkey FOREIGN KEY (workspace_id, updated_by) REFERENCES memberships (workspace_id, user_id)
  );
  CREATE INDEX scenarios_name_idx ON scenarios (workspace_id, project_id, (lower(name) COLLATE "C"), id);
  CREATE INDEX scenarios_updated_idx ON scenarios (workspace_id, project_id, updated_at, id);
  CREATE INDEX scenarios_life_idx ON scenarios (workspace_id, project_id, life_order_s, id);
  CREATE TABLE revisions (
    scenario_id uuid NOT NULL,
    number integer NOT NULL,
    workspace_id uuid NOT NULL,
    document jsonb NOT NULL,
    note text NOT NULL DEFAULT '',
    author_id uuid NOT NULL,
    restored_from integer,
    engine_version text,
    outcome text,
    life_s double precision,
    end_month integer,
    target_life_s double precision,
    created_at timestamptz NOT NULL DEFAULT clock_timestamp(),
    CONSTRAINT revisions_number_check CHECK (number > 0 AND restored_from < number),
    CONSTRAINT revisions_pkey PRIMARY KEY (scenario_id, number),
    CONSTRAINT revisions_scenario_fkey FOREIGN KEY (scenario_id, workspace_id) REFERENCES scenarios (id, workspace_id),
    CONSTRAINT revisions_author_fkey FOREIGN KEY (workspace_id, author_id) REFERENCES memberships (workspace_id, user_id),
    CONSTRAINT revisions_restored_from_fkey FOREIGN KEY (scenario_id, restored_from) REFERENCES revisions (scenario_id, number)
  );
  -- Deferred, because the scenario and its first revision need each other within one transaction.
  ALTER TABLE scenarios ADD CONSTRAINT scenarios_current_revision_fkey FOREIGN KEY (id, current_revision)
    REFERENCES revisions (scenario_id, number) DEFERRABLE INITIALLY DEFERRED;
  CREATE TABLE library_items (
    id uuid CONSTRAINT library_items_pkey PRIMARY KEY,
    workspace_id uuid NOT NULL,
    kind text NOT NULL CONSTRAINT library_items_kind_check CHECK (kind IN ('part', 'cell', 'climate')),
    name text NOT NULL CONSTRAINT library_items_name_check CHECK (name <> ''),
    note text NOT NULL DEFAULT '',
    content jsonb NOT NULL,
    version integer NOT NULL DEFAULT 1 CONSTRAINT library_items_version_check CHECK (version > 0),
    archived_at timestamptz,
    created_at timestamptz NOT NULL DEFAULT clock_timestamp(),
    updated_at timestamptz NOT NULL DEFAULT clock_timestamp(),
    updated_by uuid NOT NULL,
    CONSTRAINT library_items_updated_by_fkey FOREIGN KEY (workspace_id, updated_by) REFERENCES memberships (workspace_id, user_id)
  );
  CREATE INDEX library_items_name_idx ON library_items (workspace_id, (lower(name) COLLATE "C"), id);
  CREATE INDEX library_items_updated_idx ON library_items (workspace_id, updated_at, id);
`;

const IMMUTABLE_REVISIONS = `
  CREATE FUNCTION refuse_change() RETURNS trigger LANGUAGE plpgsql AS $$
  BEGIN
    RAISE EXCEPTION 'Rows of % are never changed.', TG_TABLE_NAME USING ERRCODE = 'restrict_violation';
  END $$;
  CREATE TRIGGER revisions_immutable BEFORE UPDATE OR DELETE ON revisions FOR EACH ROW EXECUTE FUNCTION refuse_change();
  CREATE TRIGGER revisions_no_truncate BEFORE TRUNCATE ON revisions FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
`;

/** Accounts, sessions, projects, scenarios with immutable revisions, library. */
export class CreateSchema1796083200000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(ACCOUNTS);
    await runner.query(WORKSPACE_DATA);
    await runner.query(IMMUTABLE_REVISIONS);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`
      ALTER TABLE scenarios DROP CONSTRAINT scenarios_current_revision_fkey;
      DROP TABLE library_items, revisions, scenarios, projects, sign_in_attempts, setup_tokens, sessions, memberships, workspaces, users;
      DROP FUNCTION refuse_change();
    `);
  }
}
