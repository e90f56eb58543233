import { numberInput, textInput } from '#test/support/truth.ts';
import type { TruthEvaluator, TruthRow } from '#test/support/truth.ts';
import {
  dutyCycleBands,
  dutyCycleLimit,
  frameAirtimeS,
  guardWindow,
  longestResynchronisationS,
  phyPresets,
  sampledListening,
  scanTimes,
  slot,
  slotTemplates,
  superframe,
  synchronisedWindow,
} from '#common/engine/index.ts';
import type { Phy, SlotTemplate } from '#common/engine/index.ts';

const US = 1e-6;

function phyOfRow(row: TruthRow): Phy {
  const id = row.inputs['phy'] === undefined ? 'oqpsk-2450' : textInput(row, 'phy');
  const phy = id === 'sunfsk' ? phyPresets['sun-fsk-50'] : Object.values(phyPresets).find((preset) => preset.id === id);
  if (!phy) throw new Error(`${row.id}: no preset "${id}".`);
  return phy;
}

const superframeRow: TruthEvaluator = (row) => {
  const phy = phyOfRow(row);
  if (row.id.startsWith('scan-')) {
    const scanDuration = numberInput(row, 'scanDuration');
    return scanTimes(phy, { channels: 1, scanDuration, retuneS: 0, requestPsduOctets: null }).channelS;
  }
  const superframeOrder = row.inputs['macSuperframeOrder'] === undefined ? 0 : numberInput(row, 'macSuperframeOrder');
  const beaconOrder = row.inputs['macBeaconOrder'] === undefined ? superframeOrder : numberInput(row, 'macBeaconOrder');
  const times = superframe(phy, { beaconOrder, superframeOrder });
  if (row.id.startsWith('sf-bi-symbols')) return times.beaconIntervalS / phy.macSymbolS;
  if (row.id.startsWith('sf-bi-us')) return times.beaconIntervalS;
  if (row.id.startsWith('sf-duty')) return times.dutyCycle;
  return row.id.startsWith('sf-slot') ? times.slotS : times.superframeDurationS;
};

/** Rows of the other reading of macTsRxOffset take that from the row and the rest from the template. */
const tschValues: Readonly<Record<string, (template: SlotTemplate, row: TruthRow) => number | null>> = {
  'tsch-txoffset-identity': ({ ccaOffsetS, ccaS, rxTxS }) => ccaOffsetS + ccaS + rxTxS,
  'tsch-txoffset': ({ txOffsetS }) => txOffsetS,
  'tsch-rxoffset': ({ rxOffsetS }) => rxOffsetS,
  'tsch-window-centre-1120': ({ rxWaitS }, row) => numberInput(row, 'macTsRxOffset') * US + rxWaitS / 2,
  'tsch-guard-early-1120': ({ txOffsetS }, row) => txOffsetS - numberInput(row, 'macTsRxOffset') * US,
  'tsch-guard-late-1120': ({ txOffsetS, rxWaitS }, row) => numberInput(row, 'macTsRxOffset') * US + rxWaitS - txOffsetS,
  'tsch-guard-half-centred': ({ txOffsetS, rxOffsetS }) => txOffsetS - rxOffsetS,
  'tsch-idle-rx': () => slot(phyPresets['oqpsk-2450'], { use: 'idle-listen' }).mean.listenS,
  'tsch-idle-duty-101': ({ rxWaitS, slotS }, row) => rxWaitS / (numberInput(row, 'slotframeLength') * slotS),
  'tsch-rx-on-50': (_template, row) => {
    const psduOctets = numberInput(row, 'psduOctets');
    const { mean } = slot(phyPresets['oqpsk-2450'], {
      use: 'receive',
      psduOctets,
      ackPsduOctets: null,
      frameErrorRate: 0,
    });
    return mean.listenS + mean.receiveS;
  },
  'tsch-tx-ack-listen': (_template, row) => {
    const { mean } = slot(phyPresets['oqpsk-2450'], {
      use: 'transmit',
      psduOctets: 50,
      ackPsduOctets: numberInput(row, 'ackPsduOctets'),
      frameErrorRate: 0,
      ackErrorRate: 0,
    });
    return mean.listenS + mean.receiveS;
  },
  'tsch-slot15-budget': () => {
    const { txOffsetS, maxTxS, txAckDelayS, maxAckS } = slotTemplates['oqpsk-15-ms'];
    return txOffsetS + maxTxS + txAckDelayS + maxAckS;
  },
};

const tsch: TruthEvaluator = (row) => {
  if (row.id.startsWith('tsch-keepalive')) {
    const guardS = numberInput(row, 'guardUs') * US;
    return longestResynchronisationS({ guardS, tolerancePpmA: numberInput(row, 'relativePpm'), tolerancePpmB: 0 });
  }
  const compute = tschValues[row.id];
  if (!compute) throw new Error(`${row.id}: no way to compute it.`);
  return compute(slotTemplates['oqpsk-10-ms'], row);
};

const csl: TruthEvaluator = (row) => {
  const phy = phyOfRow(row);
  if (row.id === 'csl-min-ahead-default') return frameAirtimeS(phy, 0);
  const periodUnits = numberInput(row, 'macCslPeriod');
  const sampleS = row.inputs['sampleUs'] === undefined ? 0 : numberInput(row, 'sampleUs') * US;
  const { periodS, dutyCycle } = sampledListening(phy, { periodUnits, sampleS });
  if (row.id.startsWith('csl-period')) return periodS;
  if (row.id === 'csl-sample-duty') return dutyCycle;
  const { aheadS, afterS } = synchronisedWindow({
    periodS,
    elapsedS: numberInput(row, 'elapsedSinceSyncUs') * US,
    tolerancePpmA: numberInput(row, 'sumOfPpm'),
    tolerancePpmB: 0,
    uncertaintyS: numberInput(row, 'sumOfUncertaintyUs') * US,
    headerS: numberInput(row, 'minReceiveOnAheadUs') * US,
    leadS: numberInput(row, 'receiveTimeAheadUs') * US,
    afterS: numberInput(row, 'minReceiveOnAfterUs') * US,
  });
  return row.id.startsWith('csl-ahead') ? aheadS : afterS;
};

const guard: TruthEvaluator = (row) => {
  const { halfS, windowS } = guardWindow({
    intervalS: numberInput(row, 'sinceSyncUs') * US,
    tolerancePpmA: numberInput(row, 'ppmA'),
    tolerancePpmB: numberInput(row, 'ppmB'),
    jitterS: numberInput(row, 'jitterUs') * US,
  });
  return row.id.startsWith('guard-half') ? halfS : windowS;
};

const dutycycle: TruthEvaluator = (row) => {
  if (row.id.startsWith('dc-budget')) {
    const letter = row.id.slice(-1);
    const band = dutyCycleBands.find(({ name }) => name.endsWith(`(band ${letter})`));
    if (!band) throw new Error(`${row.id}: no band "${letter}".`);
    return dutyCycleLimit({ airtimeS: 1, dutyCycle: band.dutyCycle, observationS: band.observationS }).budgetS;
  }
  const { frames, shortestPeriodS, silenceS } = dutyCycleLimit({
    airtimeS: numberInput(row, 'timeOnAirUs') * US,
    dutyCycle: numberInput(row, 'dutyCycle'),
    observationS: row.inputs['observationS'] === undefined ? 3600 : numberInput(row, 'observationS'),
  });
  if (row.id.startsWith('dc-count')) return frames;
  return row.id.startsWith('dc-interval') ? shortestPeriodS : silenceS;
};

/** How the rows of guards, superframes, slots, sampled listening and duty-cycle limits are computed by the engine. */
export const linkTimingEvaluators: Readonly<Record<string, TruthEvaluator>> = {
  superframe: superframeRow,
  tsch,
  csl,
  guard,
  dutycycle,
};
