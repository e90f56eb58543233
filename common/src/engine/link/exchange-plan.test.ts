import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { InconsistentInputError } from '#common/errors.ts';
import { arbitraryExchange, everyPattern } from '#test/support/arbitrary-exchange.ts';
import { errorOf } from '#test/support/build-node.ts';
import type { ExchangePattern, FrameLoading, LinkSettings } from '../scenario/scenario.types.ts';
import { acknowledgedExchange } from './acknowledged-exchange.ts';
import { exchangePlan } from './exchange-plan.ts';
import type { ExchangePhase, ExchangePlan, PhaseId } from './exchange-plan.types.ts';
import { linkDefaults } from './link-defaults.table.ts';
import { phyPresets } from './phy.table.ts';

const link: LinkSettings = {
  phy: 'oqpsk-2450',
  busyProbability: { typical: 0.1 },
  frameErrorRate: { typical: 0.05 },
  ackErrorRate: { typical: 0.01 },
};

interface Own {
  loading?: FrameLoading;
  settings?: LinkSettings;
}

const planOf = (pattern: ExchangePattern, { loading, settings = {} }: Own = {}): ExchangePlan =>
  exchangePlan({ kind: 'exchange', ...pattern, ...(loading ? { loading } : {}) }, { ...link, ...settings });

function phaseIn({ phases }: ExchangePlan, id: PhaseId): ExchangePhase {
  const phase = phases.find((candidate) => candidate.id === id);
  if (!phase) throw new Error(`The plan has no phase "${id}".`);
  return phase;
}

describe('exchangePlan of an acknowledged exchange', () => {
  const acknowledged: ExchangePattern = { pattern: 'acknowledged', payloadOctets: 24 };
  const input = { psduOctets: 35, busyProbability: 0.1, frameErrorRate: 0.05, ackErrorRate: 0.01 };

  test('has the times of acknowledgedExchange', () => {
    const plan = planOf(acknowledged);
    const exchange = acknowledgedExchange(phyPresets['oqpsk-2450'], input);
    expect(phaseIn(plan, 'backoff').meanS).toBe(exchange.backoffS);
    expect(phaseIn(plan, 'assessment').meanS).toBe(exchange.assessmentS);
    expect(phaseIn(plan, 'turnaround').meanS).toBe(exchange.turnaroundS);
    expect(phaseIn(plan, 'frame').meanS).toBe(exchange.transmitS);
    expect(phaseIn(plan, 'acknowledgement-wait').meanS).toBe(exchange.acknowledgementWaitS);
    expect(phaseIn(plan, 'acknowledgement').meanS).toBe(exchange.acknowledgementS);
    expect(Math.abs(plan.meanS / exchange.meanDurationS - 1)).toBeLessThan(4 * Number.EPSILON);
    expect(plan.worstS).toBe(exchange.worstCaseS);
    expect(plan.deliveredProbability).toBe(exchange.receivedProbability);
  });

  test('takes single stretches from one attempt', () => {
    const plan = planOf(acknowledged);
    expect(phaseIn(plan, 'frame').longestS).toBe(plan.frame?.airtimeS);
    expect(phaseIn(plan, 'backoff').longestS).toBe(31 * 320e-6);
    expect(phaseIn(plan, 'acknowledgement-wait').longestS).toBeCloseTo(864e-6, 15);
    expect(plan.worstAttempts).toBe(4);
  });
});

describe('exchangePlan of every pattern', () => {
  test.each(everyPattern)(
    'has phases of which each lasts at most its worst, and adds them up (%#, $pattern)',
    (pattern) => {
      const plan = planOf(pattern);
      expect(new Set(plan.phases.map(({ id }) => id)).size).toBe(plan.phases.length);
      for (const { meanS, worstS, longestS } of plan.phases) {
        expect(meanS).toBeGreaterThanOrEqual(0);
        expect(meanS).toBeLessThanOrEqual(worstS * (1 + 1e-12));
        expect(longestS).toBeLessThanOrEqual(worstS);
        expect(longestS).toBeGreaterThan(0);
      }
      expect(plan.meanS).toBe(plan.phases.reduce((sumS, { meanS }) => sumS + meanS, 0));
      expect(plan.meanS).toBeLessThanOrEqual(plan.worstS);
      expect(plan.onAirMeanS).toBeLessThanOrEqual(plan.onAirWorstS * (1 + 1e-12));
    },
  );

  test('keeps means within the worst for random losses, retries and busy channels', () => {
    fc.assert(
      fc.property(arbitraryExchange, (exchange) => {
        const plan = exchangePlan(exchange, exchange.link ?? {});
        for (const { meanS, worstS } of plan.phases) expect(meanS).toBeLessThanOrEqual(worstS * (1 + 1e-12));
        expect(plan.meanS).toBeLessThanOrEqual(plan.worstS);
        if (plan.deliveredProbability !== null) {
          expect(plan.deliveredProbability).toBeGreaterThanOrEqual(0);
          expect(plan.deliveredProbability).toBeLessThanOrEqual(1);
        }
      }),
    );
  });

  test('takes no less time, and no less time on air, the more frames are lost', () => {
    const loss = fc.double({ min: 0, max: 1, noNaN: true });
    const retried = everyPattern.filter(({ pattern }) => ['acknowledged', 'listen-before-talk'].includes(pattern));
    fc.assert(
      fc.property(fc.constantFrom(...retried), loss, loss, (pattern, a, b) => {
        const at = (typical: number) => planOf(pattern, { settings: { frameErrorRate: { typical } } });
        const [few, many] = [at(Math.min(a, b)), at(Math.max(a, b))];
        expect(many.meanS).toBeGreaterThanOrEqual(few.meanS * (1 - 1e-12));
        expect(many.onAirMeanS).toBeGreaterThanOrEqual(few.onAirMeanS * (1 - 1e-12));
        expect(many.deliveredProbability ?? 1).toBeLessThanOrEqual((few.deliveredProbability ?? 0) + 1e-12);
      }),
    );
  });

  test('takes no less charge the more frames are lost', () => {
    const currentA = {
      sleep: 2e-7,
      idle: 4e-4,
      synthesiser: 0.006,
      listen: 0.012,
      receive: 0.013,
      transmit: 0.014,
      active: 0,
    };
    const chargeC = ({ phases }: ExchangePlan): number =>
      phases.reduce((sumC, { role, meanS }) => sumC + currentA[role] * meanS, 0);
    const loss = fc.double({ min: 0, max: 1, noNaN: true });
    const sent = everyPattern.filter(
      (candidate) =>
        ['acknowledged', 'unacknowledged', 'listen-before-talk'].includes(candidate.pattern) ||
        (candidate.pattern === 'slot' && candidate.slotUse === 'transmit'),
    );
    fc.assert(
      fc.property(fc.constantFrom(...sent), loss, loss, (pattern, a, b) => {
        const at = (typical: number) => chargeC(planOf(pattern, { settings: { frameErrorRate: { typical } } }));
        expect(at(Math.max(a, b))).toBeGreaterThanOrEqual(at(Math.min(a, b)) * (1 - 1e-12));
      }),
    );
  });

  const roles: [ExchangePattern['pattern'], string[]][] = [
    [
      'acknowledged',
      [
        'backoff idle',
        'assessment listen',
        'turnaround synthesiser',
        'frame transmit',
        'acknowledgement-wait listen',
        'acknowledgement receive',
      ],
    ],
    ['beacon', ['guard listen', 'frame receive', 'listen listen']],
    ['receive', ['listen listen', 'frame receive', 'turnaround synthesiser', 'acknowledgement transmit']],
    ['sampled-sender', ['wake-up transmit', 'frame transmit']],
    ['scan', ['retune synthesiser', 'listen listen']],
  ];
  test.each(roles)('%s has its phases in the order of time with their roles', (name, expected) => {
    const pattern = everyPattern.find((candidate) => candidate.pattern === name);
    expect(pattern && planOf(pattern).phases.map(({ id, role }) => `${id} ${role}`)).toEqual(expected);
  });

  test('asks for a PHY where there is none', () => {
    const error = errorOf(InconsistentInputError, () =>
      exchangePlan({ kind: 'exchange', pattern: 'acknowledged' }, {}),
    );
    expect(error).toMatchObject({ code: 'phy-missing', field: 'link.phy' });
  });
});

describe('exchangePlan: figures that nothing gives', () => {
  test('are assumed, never 0, each with a caution', () => {
    const plan = exchangePlan({ kind: 'exchange', pattern: 'acknowledged', payloadOctets: 24 }, { phy: 'oqpsk-2450' });
    expect(plan.cautions.map(({ code, field }) => `${code} ${field}`)).toEqual([
      'link-assumed link.busyProbability',
      'link-assumed link.frameErrorRate',
      'link-assumed link.ackErrorRate',
    ]);
    const figure = (id: string) => plan.figures.find((candidate) => candidate.id === id)?.value;
    expect(figure('busyProbability')).toBe(linkDefaults.busyProbability.value);
    expect(figure('frameErrorRate')).toBe(linkDefaults.frameErrorRate.value);
    expect(figure('ackErrorRate')).toBe(linkDefaults.ackErrorRate.value);
  });

  test('are none where the link gives all', () => {
    expect(planOf({ pattern: 'acknowledged', payloadOctets: 24 }).cautions).toEqual([]);
  });

  test('follow from the received level, also for the acknowledgement, and need no assumption', () => {
    const settings: LinkSettings = {
      phy: 'oqpsk-2450',
      busyProbability: { typical: 0.1 },
      receivedLevelDbm: { typical: -94 },
      sensitivityDbm: -95,
    };
    const plan = exchangePlan({ kind: 'exchange', pattern: 'acknowledged', psduOctets: 127 }, settings);
    const figure = (id: string) => plan.figures.find((candidate) => candidate.id === id)?.value ?? NaN;
    expect(plan.cautions).toEqual([]);
    expect(figure('frameErrorRate')).toBeGreaterThan(figure('ackErrorRate'));
    expect(figure('ackErrorRate')).toBeGreaterThan(0);
  });

  test('of the clocks are assumed as large as the PHY allows', () => {
    const { cautions } = planOf({ pattern: 'guard', intervalS: 60 });
    expect(cautions.map(({ field }) => field)).toEqual(['link.tolerancePpm', 'link.peerTolerancePpm']);
  });

  test('of the own clock follow from the crystal', () => {
    const settings = { crystal: { tolerancePpm: 10, ageingPpm: 5 }, peerTolerancePpm: { typical: 25 } };
    const plan = planOf({ pattern: 'guard', intervalS: 100 }, { settings });
    expect(plan.meanS).toBeCloseTo(2 * 40e-6 * 100, 15);
    expect(plan.cautions).toEqual([]);
  });
});

describe('exchangePlan: start and loading', () => {
  const acknowledged: ExchangePattern = { pattern: 'acknowledged', payloadOctets: 24 };
  const loading: FrameLoading = { partId: 'controller', stateId: 'active', clockHz: 1_000_000 };

  test('begin with the start of the crystal', () => {
    const plan = planOf(acknowledged, { settings: { crystal: { startUpS: 0.0005 } } });
    expect(plan.phases[0]).toMatchObject({ id: 'crystal-start', meanS: 0.0005, role: 'idle' });
    expect(plan.worstS).toBeCloseTo(planOf(acknowledged).worstS + 0.0005, 12);
  });

  test('load the frame over the serial line before the exchange', () => {
    expect(planOf(acknowledged, { loading }).phases[0]).toMatchObject({ id: 'loading', meanS: (35 * 8) / 1e6 });
  });

  test('load nothing before the exchange where it runs beside the frame', () => {
    const plan = planOf(acknowledged, { loading: { ...loading, beside: true } });
    expect(plan.phases[0]?.id).toBe('backoff');
    expect(plan.figures.find(({ id }) => id === 'loading-beside')?.value).toBeCloseTo((35 * 8) / 1e6, 12);
  });

  test('throw where the line beside the frame is slower than the air', () => {
    const slow = { ...loading, beside: true, clockHz: 100_000 };
    expect(errorOf(InconsistentInputError, () => planOf(acknowledged, { loading: slow })).code).toBe(
      'loading-too-slow',
    );
  });

  test('throw where nothing is sent', () => {
    const error = errorOf(InconsistentInputError, () =>
      planOf({ pattern: 'scan', channels: 1, scanDuration: 1, retuneS: 0 }, { loading }),
    );
    expect(error).toMatchObject({ code: 'nothing-to-load', field: 'loading' });
  });

  test('caution a crystal beyond what the PHY allows', () => {
    const { cautions } = planOf(acknowledged, { settings: { crystal: { tolerancePpm: 50 } } });
    expect(cautions).toEqual([expect.objectContaining({ code: 'crystal-beyond-phy', field: 'link.crystal' })]);
  });
});
