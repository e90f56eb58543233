import {
  changePasswordSchema,
  selectWorkspaceSchema,
  sessionSchema,
  setupSchema,
  signInSchema,
} from '#common/schemas/api/session.ts';
import { InvalidInputError } from '#backend/domain/errors.ts';
import { PUBLIC, SIGNED_IN } from '#backend/domain/policies.ts';
import type { AccountsService } from '#backend/services/accounts.service.ts';
import type { SetupService } from '#backend/services/setup.service.ts';
import { presentSession } from './presenters.ts';
import { defineRoute, NO_BODY, NO_INPUT, NO_PARAMS, NO_QUERY, SMALL_BODY, type Route } from './route.ts';
import type { SessionControl } from './session-control.ts';

const common = { params: NO_PARAMS, query: NO_QUERY, output: sessionSchema } as const;

async function currentSession(session: SessionControl) {
  return presentSession(await session.principal(), session.csrfToken());
}

/** Who is signed in, sign-in, sign-out. */
export function sessionRoutes(): Route[] {
  return [
    defineRoute({
      ...common,
      method: 'get',
      path: '/api/v1/session',
      policy: PUBLIC,
      input: NO_INPUT,
      success: 200,
      statuses: [],
      limits: NO_BODY,
      summary: 'Who is signed in, and the token that unsafe requests carry.',
      handler: ({ session }) => currentSession(session),
    }),
    defineRoute({
      ...common,
      method: 'post',
      path: '/api/v1/session',
      policy: PUBLIC,
      input: signInSchema,
      success: 200,
      statuses: [401, 429],
      limits: SMALL_BODY,
      summary: 'Signs in.',
      handler: async ({ session, input }) => {
        const user = await session.authenticate(input);
        await session.begin(user, null);
        return currentSession(session);
      },
    }),
    defineRoute({
      ...common,
      method: 'delete',
      path: '/api/v1/session',
      policy: PUBLIC,
      input: NO_INPUT,
      success: 200,
      statuses: [403],
      limits: NO_BODY,
      summary: 'Signs out.',
      handler: async ({ session }) => {
        await session.end();
        return currentSession(session);
      },
    }),
  ];
}

/** What a signed-in person changes about their session and account, and the very first account. */
export function accountRoutes(accounts: AccountsService, setup: SetupService): Route[] {
  return [
    defineRoute({
      ...common,
      method: 'put',
      path: '/api/v1/session/workspace',
      policy: SIGNED_IN,
      input: selectWorkspaceSchema,
      success: 200,
      statuses: [],
      limits: SMALL_BODY,
      summary: 'Chooses the workspace to work in.',
      handler: async ({ who, session, input: { workspaceId } }) => {
        if (!who.workspaces.some(({ id }) => id === workspaceId)) {
          throw new InvalidInputError([{ path: 'workspaceId', message: 'You are not a member of this workspace.' }]);
        }
        await session.choose(workspaceId);
        return currentSession(session);
      },
    }),
    defineRoute({
      ...common,
      method: 'post',
      path: '/api/v1/session/password',
      policy: SIGNED_IN,
      input: changePasswordSchema,
      success: 200,
      statuses: [429],
      limits: SMALL_BODY,
      summary: 'Changes the password and ends the other sessions of the account.',
      handler: async ({ who, session, input }) => {
        const user = await accounts.changePassword(who.user, input, session.address);
        await session.begin(user, who.workspace?.id ?? null);
        return currentSession(session);
      },
    }),
    defineRoute({
      ...common,
      method: 'post',
      path: '/api/v1/setup',
      policy: PUBLIC,
      input: setupSchema,
      success: 201,
      statuses: [],
      limits: SMALL_BODY,
      summary: 'Makes the first workspace and its owner with the one-time token of the start log, and signs in.',
      handler: async ({ session, input }) => {
        await session.begin(await setup.redeem(input), null);
        return currentSession(session);
      },
    }),
  ];
}
