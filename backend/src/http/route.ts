import { z } from 'zod';
import { LIMITS } from '#common/schemas/limits.ts';
import { problemsOfZod } from '#common/schemas/problem.ts';
import { InvalidInputError, NotFoundError } from '#backend/domain/errors.ts';
import type { Policy, PolicyName } from '#backend/domain/policies.ts';
import type { Principal } from '#backend/domain/principal.ts';
import type { SessionControl } from './session-control.ts';

export type Method = 'get' | 'post' | 'put' | 'patch' | 'delete';

/** Error answers that a route may give besides 500 and 503. */
export type ErrorStatus = 400 | 401 | 403 | 404 | 409 | 413 | 415 | 429;

/** A request as it arrives at a route: nothing of it has been looked at yet. */
export interface RawRequest {
  principal: Principal | null;
  params: unknown;
  query: unknown;
  /** Parsed JSON that has passed the body guard; undefined for a route without input. */
  body: unknown;
  session: SessionControl;
}

/** What a handler gets: everything validated, the sender admitted. */
export interface RouteContext<Admitted, Params, Query, Input> {
  who: Admitted;
  params: Params;
  query: Query;
  input: Input;
  session: SessionControl;
}

export interface RouteDefinition<
  Admitted,
  Params extends z.ZodType,
  Query extends z.ZodType,
  Input extends z.ZodType,
  Output extends z.ZodType,
> {
  method: Method;
  /** Whole path, parameters as `:name`. */
  path: string;
  policy: Policy<Admitted>;
  params: Params;
  query: Query;
  /** Body; `NO_INPUT` refuses any. */
  input: Input;
  output: Output;
  /** Status of success. */
  success: 200 | 201;
  /** Error answers of the use case; those of policy, validation and limits are added by themselves. */
  statuses: readonly ErrorStatus[];
  limits: { bodyBytes: number };
  summary: string;
  /** Name under which browsers store the answer, for downloads. */
  download?: (output: z.output<Output>) => string;
  handler: (
    context: RouteContext<Admitted, z.output<Params>, z.output<Query>, z.output<Input>>,
  ) => Promise<z.input<Output>> | z.input<Output>;
}

/** A row of the table of routes. */
export interface Route extends Omit<
  RouteDefinition<never, z.ZodType, z.ZodType, z.ZodType, z.ZodType>,
  'policy' | 'input' | 'handler' | 'download'
> {
  policy: PolicyName;
  input: z.ZodType | null;
  /** Throws unless the sender may use the route. */
  admit(principal: Principal | null): void;
  /** Admits, validates, runs the use case. */
  run(request: RawRequest): Promise<RouteAnswer>;
}

export interface RouteAnswer {
  body: unknown;
  fileName: string | null;
}

export const NO_PARAMS = z.strictObject({});
export const NO_QUERY = z.strictObject({});
export const NO_INPUT = z.undefined();

/** Names, notes, credentials. */
export const SMALL_BODY = { bodyBytes: 16 * 1024 } as const;
/** A scenario document with what stands around it. */
export const DOCUMENT_BODY = { bodyBytes: LIMITS.documentBytes } as const;
export const NO_BODY = { bodyBytes: 0 } as const;

/** Declares a route. Everything about it stands here: it is mounted, described and tested from this alone. */
export function defineRoute<
  Admitted,
  Params extends z.ZodType,
  Query extends z.ZodType,
  Input extends z.ZodType,
  Output extends z.ZodType,
>(definition: RouteDefinition<Admitted, Params, Query, Input, Output>): Route {
  const { policy, params, query, input, handler, download, ...rest } = definition;
  const hasInput = !(input instanceof z.ZodUndefined);
  return {
    ...rest,
    params,
    query,
    policy: policy.name,
    input: hasInput ? input : null,
    statuses: allStatuses(definition, hasInput),
    admit: (principal) => void policy.admit(principal),
    run: async (request) => {
      const who = policy.admit(request.principal);
      const address = params.safeParse(request.params);
      // An address that is not even well-formed leads nowhere.
      if (!address.success) throw new NotFoundError();
      const asked = query.safeParse(request.query);
      const sent = input.safeParse(request.body);
      if (!asked.success || !sent.success) {
        throw new InvalidInputError([asked, sent].flatMap(({ error }) => (error ? problemsOfZod(error) : [])));
      }
      const { session } = request;
      const body = await handler({ who, session, params: address.data, query: asked.data, input: sent.data });
      return { body, fileName: download ? download(output(definition, body)) : null };
    },
  };
}

function output<Output extends z.ZodType>({ output: schema }: { output: Output }, body: unknown): z.output<Output> {
  return schema.parse(body);
}

function allStatuses(
  {
    policy,
    params,
    query,
    statuses,
  }: { policy: { name: PolicyName }; params: z.ZodType; query: z.ZodType } & Pick<Route, 'statuses'>,
  hasInput: boolean,
): ErrorStatus[] {
  const all = new Set<ErrorStatus>(statuses);
  if (hasInput) for (const status of [400, 403, 413, 415] as const) all.add(status);
  if (query !== NO_QUERY) all.add(400);
  if (policy.name !== 'public') all.add(401);
  if (policy.name !== 'public' && policy.name !== 'signed-in') all.add(403);
  if (params !== NO_PARAMS) all.add(404);
  return [...all].sort((a, b) => a - b);
}
