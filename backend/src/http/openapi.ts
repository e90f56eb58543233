import { z } from 'zod';
import { problemSchema } from '#common/schemas/problem.ts';
import { scenarioSchema } from '#common/schemas/scenario.schema.ts';
import { PUBLIC } from '#backend/domain/policies.ts';
import { defineRoute, NO_BODY, NO_INPUT, NO_PARAMS, NO_QUERY, type Route } from './route.ts';

type Json = Record<string, unknown>;

const PROBLEM = {
  description: 'What went wrong, with every problem found (RFC 9457).',
  content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } },
};

/** The description of the API, made from the table of routes alone. */
export function openApi(routes: readonly Route[]): Json {
  const paths: Record<string, Json> = {};
  for (const route of routes) {
    const path = route.path.replace(/:(\w+)/g, '{$1}');
    paths[path] = { ...paths[path], [route.method]: operation(route) };
  }
  return {
    openapi: '3.1.0',
    info: {
      title: 'Overwinter',
      version: '1',
      description:
        'Unsafe requests carry the token of GET /api/v1/session in the header X-CSRF-Token. Numbers are in SI units, temperatures in °C.',
    },
    paths,
    components: {
      schemas: { Problem: describe(problemSchema, 'output'), ...sharedSchemas() },
      securitySchemes: { session: { type: 'apiKey', in: 'cookie', name: 'overwinter_session' } },
    },
  };
}

/** The route that serves the description; it describes itself too. */
export function openApiRoute(others: readonly Route[]): Route {
  const route: Route = defineRoute({
    method: 'get',
    path: '/api/v1/openapi.json',
    policy: PUBLIC,
    params: NO_PARAMS,
    query: NO_QUERY,
    input: NO_INPUT,
    output: z.record(z.string(), z.unknown()),
    success: 200,
    statuses: [],
    limits: NO_BODY,
    summary: 'This description.',
    handler: () => openApi([...others, route]),
  });
  return route;
}

function operation(route: Route): Json {
  const answers = route.statuses.map((status) => [String(status), PROBLEM] as const);
  return {
    summary: route.summary,
    operationId: operationId(route),
    'x-policy': route.policy,
    security: route.policy === 'public' ? [] : [{ session: [] }],
    parameters: [...parameters(route.params, 'path'), ...parameters(route.query, 'query')],
    ...(route.input === null
      ? {}
      : {
          requestBody: { required: true, content: { 'application/json': { schema: describe(route.input, 'input') } } },
        }),
    responses: {
      [String(route.success)]: {
        description: 'Done.',
        content: { 'application/json': { schema: describe(route.output, 'output') } },
      },
      ...Object.fromEntries(answers),
      default: PROBLEM,
    },
  };
}

function operationId({ method, path }: Route): string {
  const words = path.replace(/^\/(api\/v1\/)?/, '').split(/[^A-Za-z]+/);
  return [method, ...words].filter(Boolean).join('-');
}

function parameters(schema: z.ZodType, place: 'path' | 'query'): Json[] {
  const described = describe(schema, 'input');
  const { properties, required } = z
    .object({ properties: z.record(z.string(), z.unknown()).default({}), required: z.array(z.string()).default([]) })
    .parse(described);
  return Object.entries(properties).map(([name, property]) => ({
    name,
    in: place,
    required: required.includes(name),
    schema: property,
  }));
}

/** The document stands once, the other schemas refer to it. */
const shared = z.registry<{ id: string }>();
shared.add(scenarioSchema, { id: 'Scenario' });

function describe(schema: z.ZodType, io: 'input' | 'output'): Json {
  const described: Json = {
    ...z.toJSONSchema(schema, {
      io,
      unrepresentable: 'any',
      metadata: shared,
      override: ({ zodSchema, jsonSchema }) => {
        if (zodSchema === scenarioSchema && schema !== scenarioSchema) {
          for (const key of Object.keys(jsonSchema)) Reflect.deleteProperty(jsonSchema, key);
          jsonSchema.$ref = '#/components/schemas/Scenario';
        }
      },
    }),
  };
  return withoutKeys(described, ['$schema', '$defs', 'id']);
}

function sharedSchemas(): Json {
  return { Scenario: describe(scenarioSchema, 'output') };
}

function withoutKeys(record: Json, keys: readonly string[]): Json {
  return Object.fromEntries(Object.entries(record).filter(([key]) => !keys.includes(key)));
}
