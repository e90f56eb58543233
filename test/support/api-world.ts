import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import type { Role } from '#common/schemas/api/common.ts';
import { ApiClient, PASSWORD } from './api-client.ts';
import type { ApiServer } from './api-server.ts';
import { buildNode, buildPart, buildRoutine, buildStep, buildTransition } from './build-node.ts';

/** A small scenario that can be computed: a sensor read every 100 s on one lithium cell, in a mild climate. */
export function buildScenario(overrides: Partial<Scenario> = {}): Scenario {
  const sensor = buildPart(
    'sensor',
    { sleep: 1e-6, measure: 1e-3 },
    {
      kind: 'sensor',
      transitions: [buildTransition('sleep>measure', 0.001, 1e-4), buildTransition('measure>sleep', 0)],
    },
  );
  return {
    schemaVersion: 1,
    name: 'Soil sensor',
    node: buildNode([sensor], [buildRoutine('report', [buildStep('read', 0.05, { sensor: 'measure' })])]),
    supply: {
      series: 1,
      parallel: 1,
      regulator: { kind: 'none' },
      cell: {
        designation: 'invented',
        capacityC: { typical: 3_600 },
        openCircuitTableV: [
          [0, 3.6],
          [0.9, 3.4],
          [1, 2.2],
        ],
        resistanceOhm: [{ ohm: { typical: 10 } }],
        resistanceFactorByTemperature: [
          [-20, 3],
          [20, 1],
        ],
        resistanceFactorByDepth: [
          [0, 1],
          [1, 3],
        ],
        selfDischarge: { lossPerYear: { typical: 0.01 }, referenceC: 20 },
      },
    },
    climate: { startMonth: 1, months: Array.from({ length: 12 }, () => ({ meanC: 10, amplitudeK: 5 })) },
    target: { lifeS: 3 * 31_557_600, confidence: 0.9 },
    ...overrides,
  };
}

/** A document of valid shape whose routine needs a move that no transition offers. */
export function buildStuckScenario(): Scenario {
  const scenario = buildScenario({ name: 'Half done' });
  const radio = buildPart(
    'radio',
    { sleep: 1e-6, idle: 1e-3, send: 1e-2 },
    { transitions: [buildTransition('sleep>idle', 0.001), buildTransition('idle>sleep', 0.001)] },
  );
  const routine = buildRoutine('send', [buildStep('burst', 0.01, { radio: 'send' })]);
  return { ...scenario, node: buildNode([...scenario.node.parts, radio], [...scenario.node.routines, routine]) };
}

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
