import type { Database, Unit } from '#backend/persistence/database.ts';
import type { ForecastService } from '../forecast.service.ts';
import type { Passwords } from '../passwords.ts';
import type { DemoAccount, DemoScenario, DemoWorkspace } from './demo.types.ts';

/** Accounts of the demo: the part before `@tarnfold.example`, the name shown, and the role of the same word. */
export const DEMO_ACCOUNTS: readonly { account: DemoAccount; name: string }[] = [
  { account: 'owner', name: 'Odile Marsh' },
  { account: 'engineer', name: 'Edda Thorne' },
  { account: 'sales', name: 'Silas Wren' },
  { account: 'viewer', name: 'Vera Holt' },
];

/**
 * Address that a demo account signs in with.
 *
 * @param account the account
 * @returns its e-mail address, at a domain that cannot exist
 */
export function demoEmail(account: DemoAccount): string {
  return `${account}@tarnfold.example`;
}

interface Seeding {
  unit: Unit;
  workspaceId: string;
  userIds: Readonly<Record<DemoAccount, string>>;
  forecasts: ForecastService;
}

/**
 * Writes the demo workspace with its accounts, all or nothing, unless there is one.
 *
 * @param tools database, password hashing and forecasts
 * @param demo the workspace as data
 * @param password of all four accounts
 * @returns whether it was written now
 * @throws {Error} when an account with one of the addresses exists outside the demo
 */
export async function seedDemo(
  tools: { database: Database; passwords: Passwords; forecasts: ForecastService },
  demo: DemoWorkspace,
  password: string,
): Promise<boolean> {
  const { database, passwords, forecasts } = tools;
  if (await database.unit.accounts.hasDemo()) return false;
  const passwordHash = await passwords.hash(password);
  return database.transaction(async (unit) => {
    if (await unit.accounts.hasDemo()) return false;
    const workspaceId = await unit.accounts.createWorkspace({ name: demo.name, isDemo: true });
    const userIds = { owner: '', engineer: '', sales: '', viewer: '' };
    for (const { account, name } of DEMO_ACCOUNTS) {
      userIds[account] = await unit.accounts.createUser({ email: demoEmail(account), name, passwordHash });
      await unit.accounts.addMember(workspaceId, userIds[account], account);
    }
    // Lists show what was changed last first: written backwards, they show the order of the data.
    for (const project of demo.projects.toReversed()) {
      const { projects } = unit.workspace(workspaceId);
      const projectId = await projects.create({ name: project.name, description: project.description });
      for (const scenario of project.scenarios.toReversed()) {
        await seedScenario({ unit, workspaceId, userIds, forecasts }, projectId, scenario);
      }
    }
    return true;
  });
}

async function seedScenario(seeding: Seeding, projectId: string, { revisions }: DemoScenario): Promise<void> {
  const { unit, workspaceId, userIds, forecasts } = seeding;
  const repositories = unit.workspace(workspaceId);
  let scenarioId = '';
  for (const [index, { document, note, author }] of revisions.entries()) {
    const forecast = forecasts.summarise(document);
    const head = { name: document.name, forecast, updatedById: userIds[author] };
    if (index === 0) scenarioId = await repositories.scenarios.create(projectId, head);
    else await repositories.scenarios.advanceIfVersion(scenarioId, index, head);
    await repositories.revisions.create({
      scenarioId,
      number: index + 1,
      document,
      note,
      authorId: userIds[author],
      restoredFrom: null,
      forecast,
    });
  }
}
