import type { Role } from '#common/schemas/api/common.ts';
import { ApiClient, PASSWORD } from './api-client.ts';
import type { ApiServer } from './api-server.ts';
import { buildScenario } from './api-scenario.ts';

export interface Workspace {
  id: string;
  /** User ids by role. */
  userIds: Readonly<Record<Role, string>>;
  projectId: string;
  /** A scenario of that project with two revisions, at version 2. */
  scenarioId: string;
  itemId: string;
}

export const ROLE_NAMES: readonly Role[] = ['owner', 'engineer', 'sales', 'viewer'];

/** E-mail address of a member made by `buildWorkspace`. */
export function emailOf(role: string, workspace: string): string {
  return `${role}@${workspace}.example`;
}

/** A workspace with a member of each role, a project, a scenario with two revisions and a library item. */
export async function buildWorkspace(api: ApiServer, name: string): Promise<Workspace> {
  const passwordHash = await api.passwords.hash(PASSWORD);
  return api.database.transaction(async (unit) => {
    const id = await unit.accounts.createWorkspace({ name, isDemo: false });
    const userIds = { owner: '', engineer: '', sales: '', viewer: '' };
    for (const role of ROLE_NAMES) {
      const user = { email: emailOf(role, name), name: `${role} of ${name}`, passwordHash };
      userIds[role] = await unit.accounts.createUser(user);
      await unit.accounts.addMember(id, userIds[role], role);
    }
    const { projects, scenarios, revisions, library } = unit.workspace(id);
    const projectId = await projects.create({ name: 'Orchard', description: '' });
    const document = buildScenario();
    const forecast = api.forecasts.summarise(document);
    const updatedById = userIds.engineer;
    const head = { name: document.name, forecast, updatedById };
    const scenarioId = await scenarios.create(projectId, head);
    const revision = { scenarioId, document, authorId: updatedById, restoredFrom: null, forecast };
    await revisions.create({ ...revision, number: 1, note: 'First' });
    await scenarios.advanceIfVersion(scenarioId, 1, head);
    await revisions.create({ ...revision, number: 2, note: 'Second' });
    const [part] = document.node.parts;
    if (part === undefined) throw new Error('The scenario has a part.');
    const content = { kind: 'part', part } as const;
    const itemId = await library.create({ name: 'Sensor', note: '', content, updatedById });
    return { id, userIds, projectId, scenarioId, itemId };
  });
}

/** Signs somebody in and fails loudly where that does not work. */
export async function signedIn(api: ApiServer, email: string): Promise<ApiClient> {
  const client = new ApiClient(api);
  const response = await client.signIn(email);
  if (response.status !== 200) throw new Error(`${email} could not sign in: ${response.text}`);
  return client;
}

export async function removeMember(api: ApiServer, workspaceId: string, userId: string): Promise<void> {
  await api.sql('UPDATE memberships SET removed_at = now() WHERE workspace_id = $1 AND user_id = $2', [
    workspaceId,
    userId,
  ]);
}
