import { numberInput, textInput } from '#test/support/truth.ts';
import type { TruthEvaluator, TruthRow } from '#test/support/truth.ts';
import {
  acknowledgedExchange,
  bitErrorRate,
  csmaCa,
  maxFrameTotalWaitS,
  phyPresets,
  poll,
} from '#common/engine/index.ts';
import type { AcknowledgedExchange, CsmaCa, Phy } from '#common/engine/index.ts';

/** PSDU of the data request of the rows that give none, short addresses. */
const DATA_REQUEST_OCTETS = 12;

function presetOf(row: TruthRow): Phy {
  if (row.inputs['phy'] === undefined) return phyPresets['oqpsk-2450'];
  const id = textInput(row, 'phy');
  const phy = Object.values(phyPresets).find((preset) => preset.id === id);
  if (!phy) throw new Error(`${row.id}: no preset "${id}".`);
  return phy;
}

/** Inputs of these names that the row has. */
function given<K extends string>(row: TruthRow, names: readonly K[]): Partial<Record<K, number>> {
  const found: Partial<Record<K, number>> = {};
  for (const name of names) if (row.inputs[name] !== undefined) found[name] = numberInput(row, name);
  return found;
}

const backoffOf = (row: TruthRow): Partial<Record<'macMinBE' | 'macMaxBE' | 'macMaxCSMABackoffs', number>> =>
  given(row, ['macMinBE', 'macMaxBE', 'macMaxCSMABackoffs']);

const csmaValues: [string, (csma: CsmaCa) => number][] = [
  ['csma-units-ok-', ({ ifSuccess }) => ifSuccess.meanBackoffUnits],
  ['csma-units-', ({ meanBackoffUnits }) => meanBackoffUnits],
  ['csma-ccas-ok-', ({ ifSuccess }) => ifSuccess.meanAssessments],
  ['csma-ccas-', ({ meanAssessments }) => meanAssessments],
  ['csma-pfail-', ({ failureProbability }) => failureProbability],
  ['csma-first-backoff-', ({ meanBackoffS }) => meanBackoffS],
  ['csma-worst-', ({ worstCaseS }) => worstCaseS],
  ['csma-access-', ({ meanAccessS }) => meanAccessS],
  ['slotted-units-', ({ meanBackoffUnits }) => meanBackoffUnits],
  ['slotted-ccas-', ({ meanAssessments }) => meanAssessments],
  ['slotted-pfail-', ({ failureProbability }) => failureProbability],
];

function valueOf<T>(row: TruthRow, table: readonly (readonly [string, (result: T) => number])[], result: T): number {
  const entry = table.find(([start]) => row.id.startsWith(start));
  if (!entry) throw new Error(`${row.id}: no way to compute it.`);
  return entry[1](result);
}

const csma: TruthEvaluator = (row) => {
  // The worst case does not depend on how busy the channel is.
  const { busyProbability = 0 } = given(row, ['busyProbability']);
  return valueOf(row, csmaValues, csmaCa(presetOf(row), { busyProbability, ...backoffOf(row) }));
};

const slotted: TruthEvaluator = (row) =>
  valueOf(
    row,
    csmaValues,
    csmaCa(presetOf(row), {
      busyProbability: numberInput(row, 'firstCcaBusy'),
      ...backoffOf(row),
      slotted: { secondBusyProbability: numberInput(row, 'secondCcaBusyGivenFirstIdle') },
    }),
  );

const exchangeValues: Readonly<Record<string, (exchange: AcknowledgedExchange) => number>> = {
  attempts: ({ meanAccessAttempts }) => meanAccessAttempts,
  tx: ({ meanTransmissions }) => meanTransmissions,
  psucc: ({ acknowledgedProbability }) => acknowledgedProbability,
  pcaf: ({ accessFailureProbability }) => accessFailureProbability,
  pnoack: ({ noAckProbability }) => noAckProbability,
  deliv: ({ receivedProbability }) => receivedProbability,
  txTime: ({ transmitS }) => transmitS,
  ccaTime: ({ assessmentS }) => assessmentS,
  backoff: ({ backoffS }) => backoffS,
  turn: ({ turnaroundS }) => turnaroundS,
  ackListen: ({ ackListenS }) => ackListenS,
};

const exchange: TruthEvaluator = (row) => {
  const value = exchangeValues[row.id.slice(row.id.lastIndexOf('-') + 1)];
  if (!value) throw new Error(`${row.id}: no way to compute it.`);
  return value(
    acknowledgedExchange(presetOf(row), {
      psduOctets: numberInput(row, 'psduOctets'),
      busyProbability: numberInput(row, 'busyProbability'),
      frameErrorRate: numberInput(row, 'frameErrorRate'),
      ackErrorRate: numberInput(row, 'ackErrorRate'),
      macMaxFrameRetries: numberInput(row, 'macMaxFrameRetries'),
      ackPsduOctets: numberInput(row, 'ackPsduOctets'),
      ...backoffOf(row),
    }),
  );
};

const indirect: TruthEvaluator = (row) => {
  const {
    dataRequestOctets = DATA_REQUEST_OCTETS,
    responseDelayUs,
    pollTimeoutMs,
  } = given(row, ['dataRequestOctets', 'responseDelayUs', 'pollTimeoutMs']);
  const comes = row.inputs['responseArrives'] !== false;
  // What is sent does not depend on the length of the response.
  const { responsePsduOctets = DATA_REQUEST_OCTETS } = given(row, ['responsePsduOctets']);
  const polled = poll(presetOf(row), {
    dataRequestOctets,
    framePending: true,
    busyProbability: 0,
    ...(comes ? { responsePsduOctets } : {}),
    ...(responseDelayUs === undefined ? {} : { responseDelayS: responseDelayUs / 1e6 }),
    ...(pollTimeoutMs === undefined ? {} : { waitS: pollTimeoutMs / 1e3 }),
  });
  return row.id.startsWith('poll-data-tx-') ? polled.transmitS : polled.listenS;
};

/** Longest wait for an announced frame, in the unit of its row. */
export function announcedWait(phy: Phy, row: TruthRow): number {
  const waitS = maxFrameTotalWaitS(phy, backoffOf(row));
  return row.expected.unit === 'symbols' ? waitS / phy.macSymbolS : waitS;
}

/** How rows of channel access, exchanges, polls and bit errors are computed by the engine. */
export const linkExchangeEvaluators: Readonly<Record<string, TruthEvaluator>> = {
  csma,
  'csma-slotted': slotted,
  exchange,
  indirect,
  'bit-error': (row) => bitErrorRate(10 ** (numberInput(row, 'sinrDb') / 10)),
};
