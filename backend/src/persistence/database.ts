import type { DataSource, EntityManager } from 'typeorm';
import { AccountsRepository } from './accounts.repository.ts';
import { LibraryRepository } from './library.repository.ts';
import { ProjectsRepository } from './projects.repository.ts';
import { RevisionsRepository } from './revisions.repository.ts';
import { ScenariosRepository } from './scenarios.repository.ts';
import { SetupTokensRepository } from './setup-tokens.repository.ts';
import { SignInAttemptsRepository } from './sign-in-attempts.repository.ts';
import { WorkspaceScope } from './workspace-scope.ts';

/** Repositories of one workspace's data. */
export interface WorkspaceRepositories {
  projects: ProjectsRepository;
  scenarios: ScenariosRepository;
  revisions: RevisionsRepository;
  library: LibraryRepository;
}

/** Repositories over one connection, or over one transaction. */
export class Unit {
  readonly accounts: AccountsRepository;
  readonly setupTokens: SetupTokensRepository;
  readonly signInAttempts: SignInAttemptsRepository;
  readonly #manager: EntityManager;

  constructor(manager: EntityManager) {
    this.#manager = manager;
    this.accounts = new AccountsRepository(manager);
    this.setupTokens = new SetupTokensRepository(manager);
    this.signInAttempts = new SignInAttemptsRepository(manager);
  }

  workspace(workspaceId: string): WorkspaceRepositories {
    const scope = new WorkspaceScope(this.#manager, workspaceId);
    return {
      projects: new ProjectsRepository(scope),
      scenarios: new ScenariosRepository(scope),
      revisions: new RevisionsRepository(scope),
      library: new LibraryRepository(scope),
    };
  }
}

/** Codes and messages by which PostgreSQL and its driver say that there is no database to speak to now. */
const AWAY_CODES = /^(ECONNREFUSED|ECONNRESET|ETIMEDOUT|EPIPE|EHOSTUNREACH|ENOTFOUND|57P0[1-3]|08...|53300|57014)$/;
const AWAY_MESSAGES = /connection (terminated|timeout)|timeout exceeded when trying to connect|not queryable/i;

/** What services see of the database. */
export class Database {
  readonly #dataSource: DataSource;

  constructor(dataSource: DataSource) {
    this.#dataSource = dataSource;
  }

  /** For reads and single-row writes. */
  get unit(): Unit {
    return new Unit(this.#dataSource.manager);
  }

  workspace(workspaceId: string): WorkspaceRepositories {
    return this.unit.workspace(workspaceId);
  }

  /** Runs all of `work` or none of it. Everything inside goes through the unit that it is given. */
  async transaction<T>(work: (unit: Unit) => Promise<T>): Promise<T> {
    return this.#dataSource.transaction((manager) => work(new Unit(manager)));
  }

  async ping(): Promise<void> {
    await this.#dataSource.query('SELECT 1');
  }
}

/** Whether an error means that the database cannot be reached now, as against a mistake of ours. */
export function isDatabaseAway(error: unknown): boolean {
  if (!(error instanceof Error)) return false;
  const code = 'code' in error && typeof error.code === 'string' ? error.code : '';
  if (AWAY_CODES.test(code) || AWAY_MESSAGES.test(error.message)) return true;
  const inner = error instanceof AggregateError ? error.errors : [error.cause];
  return inner.some((cause) => cause !== error && isDatabaseAway(cause));
}
