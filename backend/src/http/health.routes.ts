import { z } from 'zod';
import { PUBLIC } from '#backend/domain/policies.ts';
import type { HealthService } from '#backend/services/health.service.ts';
import { defineRoute, NO_BODY, NO_INPUT, NO_PARAMS, NO_QUERY, type Route } from './route.ts';

const healthSchema = z.strictObject({ status: z.literal('ok') });
const common = {
  method: 'get',
  policy: PUBLIC,
  params: NO_PARAMS,
  query: NO_QUERY,
  input: NO_INPUT,
  output: healthSchema,
  success: 200,
  statuses: [],
  limits: NO_BODY,
} as const;

export function healthRoutes(health: HealthService): Route[] {
  return [
    defineRoute({
      ...common,
      path: '/health/live',
      summary: 'The process answers.',
      handler: () => ({ status: 'ok' as const }),
    }),
    defineRoute({
      ...common,
      path: '/health/ready',
      summary: 'The process answers and reaches its database; 503 otherwise.',
      handler: async () => {
        await health.checkReady();
        return { status: 'ok' as const };
      },
    }),
  ];
}
