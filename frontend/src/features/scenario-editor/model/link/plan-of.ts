import { exchangePlan } from '#common/engine/link/exchange-plan.ts';
import type { ExchangePlan } from '#common/engine/link/exchange-plan.types.ts';
import { linkOf } from '#common/engine/link/link-of.ts';
import type { ExchangeDuration, LinkSettings } from '#common/engine/scenario/scenario.types.ts';
import { EngineError } from '#common/errors.ts';

/** The plan of an exchange, or why its inputs give none. */
export type PlanResult = { kind: 'plan'; plan: ExchangePlan } | { kind: 'problem'; message: string; field: string };

/** What an exchange comes to with the settings of its node. */
export function planOf(exchange: ExchangeDuration, nodeLink: LinkSettings | undefined): PlanResult {
  try {
    return { kind: 'plan', plan: exchangePlan(exchange, linkOf(nodeLink, exchange.link)) };
  } catch (error) {
    if (!(error instanceof EngineError)) throw error;
    return { kind: 'problem', message: error.message, field: error.field };
  }
}
