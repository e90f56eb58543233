import type { CustomPhy, PhyId } from '../scenario/scenario.types.ts';
import { phyPresets } from './phy.table.ts';
import type { Phy } from './phy.types.ts';

const OWN = 'given in the scenario';
const NOT_GIVEN = 'not given in the scenario';

/**
 * The PHY that a scenario names: a preset, or one of its own, whose MAC constants are then unknown.
 *
 * @param phy Preset id, or bit rate (bit/s), bits per symbol, header octets and longest PSDU of a PHY of one's own.
 * @returns The PHY; what a PHY of one's own does not give is null.
 * @example phyOf('oqpsk-2450').bitS // 0.000004
 */
export function phyOf(phy: PhyId | CustomPhy): Phy {
  if (typeof phy === 'string') return phyPresets[phy];
  const { bitRateBps, bitsPerSymbol, shrOctets, phrOctets, maxPsduOctets } = phy;
  const symbolS = bitsPerSymbol / bitRateBps;
  return {
    id: 'custom',
    bitRateBps,
    bitsPerSymbol,
    bitS: 1 / bitRateBps,
    symbolS,
    macSymbolS: symbolS,
    symbolsPerOctet: 8 / bitsPerSymbol,
    shrOctets,
    phrOctets,
    maxPsduOctets: maxPsduOctets ?? null,
    turnaroundS: null,
    ccaS: null,
    unitBackoffS: null,
    ackWaitS: null,
    sifsS: null,
    lifsS: null,
    sources: {
      bitRateBps: OWN,
      bitsPerSymbol: OWN,
      macSymbolS: 'assumed: the data symbol',
      shrOctets: OWN,
      phrOctets: OWN,
      maxPsduOctets: maxPsduOctets === undefined ? NOT_GIVEN : OWN,
      turnaroundS: NOT_GIVEN,
      ccaS: NOT_GIVEN,
      unitBackoffS: NOT_GIVEN,
      ackWaitS: NOT_GIVEN,
      sifsS: NOT_GIVEN,
      lifsS: NOT_GIVEN,
    },
  };
}
