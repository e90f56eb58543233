import { UnauthenticatedError } from '#backend/domain/errors.ts';
import type { SessionControl } from './session-control.ts';

const refuse = (): never => {
  throw new UnauthenticatedError();
};

/** Where no session is read: health checks and files. */
export const noSession: SessionControl = {
  address: 'unknown',
  authenticate: async () => refuse(),
  begin: async () => refuse(),
  end: async () => refuse(),
  choose: async () => refuse(),
  principal: async () => null,
  csrfToken: refuse,
  hasToken: () => false,
};
