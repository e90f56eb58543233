import type { InputProblem } from '#common/schemas/problem.ts';
import type { LibraryRecord, ProjectRecord, ScenarioWithDocument } from './records.types.ts';

/** Base of everything a use case refuses on purpose. `code` is part of the API. */
export abstract class DomainError extends Error {
  abstract readonly code: string;
}

/** The thing does not exist, or not for this workspace: both look the same from outside. */
export class NotFoundError extends DomainError {
  readonly code = 'not-found';

  constructor() {
    super('There is nothing at this address, or it is not yours to see.');
  }
}

/** Nobody is signed in. */
export class UnauthenticatedError extends DomainError {
  readonly code: 'unauthenticated' | 'wrong-credentials';

  constructor(code: 'unauthenticated' | 'wrong-credentials' = 'unauthenticated') {
    super(code === 'unauthenticated' ? 'Sign in first.' : 'The e-mail address or the password is wrong.');
    this.code = code;
  }
}

/** Signed in, but the role does not allow it. */
export class ForbiddenError extends DomainError {
  readonly code: 'forbidden' | 'no-workspace' | 'cross-site';

  constructor(code: 'forbidden' | 'no-workspace' | 'cross-site', message: string) {
    super(message);
    this.code = code;
  }
}

export type Conflict =
  | { kind: 'project'; current: ProjectRecord }
  | { kind: 'scenario'; current: ScenarioWithDocument }
  | { kind: 'library-item'; current: LibraryRecord };

/** The row was changed since it was read; carries what is stored now. */
export class ConflictError extends DomainError {
  readonly code = 'conflict';
  readonly conflict: Conflict;

  constructor(conflict: Conflict) {
    super('It was changed since you read it. Nothing was stored; both versions are in this answer.');
    this.conflict = conflict;
  }
}

/** The input contradicts itself or the stored data; carries every problem found. */
export class InvalidInputError extends DomainError {
  readonly code = 'invalid-input';
  readonly problems: readonly InputProblem[];

  constructor(problems: readonly InputProblem[], options?: ErrorOptions) {
    super('Some of the input cannot be used.', options);
    this.problems = problems;
  }
}

/** Too many attempts in too short a time. */
export class LimitExceededError extends DomainError {
  readonly code = 'too-many-attempts';
  readonly retryAfterS: number;

  constructor(retryAfterS: number) {
    super(`Too many attempts. Try again in ${retryAfterS} s.`);
    this.retryAfterS = retryAfterS;
  }
}

/** The server has more work than it takes on at once. */
export class BusyError extends DomainError {
  readonly code = 'busy';
  readonly retryAfterS = 2;

  constructor() {
    super('The server is busy. Try again in a moment.');
  }
}
