import type { ExchangeDuration, LinkSettings } from '../scenario/scenario.types.ts';
import type { ExchangePlan } from './exchange-plan.types.ts';
import type { PlanContext } from './plan-context.ts';
import { planAdvertising, planChirp } from './plan-other-links.ts';
import { planPoll } from './plan-poll.ts';
import { planForward, planOverhear, planReceive, planScan } from './plan-received.ts';
import { planAcknowledged, planFrame, planListenBeforeTalk, planUnacknowledged } from './plan-sent.ts';
import { planSlot } from './plan-slot.ts';
import { planBeacon, planGuard, planSampledListener, planSampledSender } from './plan-timed.ts';

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
    case 'listen-before-talk':
      return planListenBeforeTalk({ ...own, exchange });
    case 'poll':
      return planPoll({ ...own, exchange });
    case 'slot':
      return planSlot({ ...own, exchange });
    case 'chirp':
      return planChirp({ ...own, exchange });
    case 'advertising':
      return planAdvertising({ ...own, exchange });
    default:
      return receivingPlan(exchange, own);
  }
}

/** Patterns that receive, wait for frames or wake a receiver; apart only so that neither choice grows too long. */
function receivingPlan(
  exchange: Exclude<
    ExchangeDuration,
    {
      pattern:
        'frame' | 'acknowledged' | 'unacknowledged' | 'listen-before-talk' | 'poll' | 'slot' | 'chirp' | 'advertising';
    }
  >,
  own: Omit<PlanContext, 'exchange'>,
): ExchangePlan {
  switch (exchange.pattern) {
    case 'beacon':
      return planBeacon({ ...own, exchange });
    case 'guard':
      return planGuard({ ...own, exchange });
    case 'sampled-listener':
      return planSampledListener({ ...own, exchange });
    case 'sampled-sender':
      return planSampledSender({ ...own, exchange });
    case 'receive':
      return planReceive({ ...own, exchange });
    case 'forward':
      return planForward({ ...own, exchange });
    case 'overhear':
      return planOverhear({ ...own, exchange });
    case 'scan':
      return planScan({ ...own, exchange });
  }
}
