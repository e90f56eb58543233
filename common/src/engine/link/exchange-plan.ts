import type { ExchangeDuration, LinkSettings } from '../scenario/scenario.types.ts';
import { assemblePlan, phaseOf } from './assemble-plan.ts';
import { exchangeAirtime } from './exchange-airtime.ts';
import type { ExchangePlan } from './exchange-plan.types.ts';
import type { PlanContext } from './plan-context.ts';
import { AIRTIME } from './plan-exchange.ts';
import { planAcknowledged, planFrame, planUnacknowledged } from './plan-sent.ts';

/**
 * Everything that an exchange step comes to: what the radio does for how long, on average and at worst, frame octet by octet,
 * figures with formulas and sources, delivery, time on air, cautions.
 *
 * @param exchange The exchange step's duration.
 * @param link Link settings that hold for it (`linkOf`); figures that they leave out are assumed, with a caution `link-assumed`.
 * @returns The plan.
 * @throws InconsistentInputError or OutOfRangeError of the formulas; fields are relative to the exchange.
 * @example exchangePlan({ kind: 'exchange', pattern: 'frame', psduOctets: 5 }, { phy: 'oqpsk-2450' }).meanS // 0.000352
 */
export function exchangePlan(exchange: ExchangeDuration, link: LinkSettings): ExchangePlan {
  const own = { link, cautions: [], figures: [] };
  switch (exchange.pattern) {
    case 'frame':
      return planFrame({ ...own, exchange });
    case 'acknowledged':
      return planAcknowledged({ ...own, exchange });
    case 'unacknowledged':
      return planUnacknowledged({ ...own, exchange });
    default:
      return planAirtime({ ...own, exchange });
  }
}

function planAirtime(context: PlanContext): ExchangePlan {
  const { airtimeS, notCounted } = exchangeAirtime(context.exchange, context.link);
  if (notCounted !== null) {
    const message = `This step (${context.exchange.pattern}) counts the airtime of its main frame only. Not counted: ${notCounted}.`;
    context.cautions.push({ code: 'link-airtime-only', message, field: '' });
  }
  return assemblePlan(context, {
    phases: [phaseOf('frame', { meanS: airtimeS, worstS: airtimeS }, AIRTIME)],
    frame: null,
    deliveredProbability: null,
    payloadOctets: null,
    onAirMeanS: airtimeS,
    onAirWorstS: airtimeS,
  });
}
