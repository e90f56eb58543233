import type { PhyId } from '../scenario/scenario.types.ts';
import type { Phy, PhyConstant } from './phy.types.ts';

/**
 * Presets of the physical layer after IEEE 802.15.4 and its amendments.
 *
 * Columns: bits per second, bits per data symbol, MAC symbol in µs, octets, µs. MAC constants in symbols of the MAC symbol:
 * aTurnaroundTime 12, aCcaTime 8, aUnitBackoffPeriod 20 = turnaround + assessment, macSIFSPeriod 12, macLIFSPeriod 40,
 * macAckWaitDuration = 20 + 12 + SHR + ceil(6 · symbols per octet). SUN FSK: turnaround 1 ms = 50 symbols of 20 µs.
 * Sources by constant below; revisions are those that were read.
 */
const NS3 =
  'ns-3 src/lr-wpan/model/lr-wpan-phy.cc, lr-wpan-mac.cc, lr-wpan-constants.h @1406464 (cite IEEE 802.15.4-2006 Tables 1, 19, 20, 22; 2011 Tables 51, 66)';
const ZEPHYR = 'Zephyr include/zephyr/net/ieee802154_radio.h @045e3a8 (cites IEEE 802.15.4-2020 clauses 11 to 13, 19)';
const RIOT =
  'RIOT sys/include/net/ieee802154.h @c8bd52f (cites IEEE 802.15.4-2006 6.5.2, 2020 Table 11-1, 802.15.4g Table 70)';
const MSK_CHANNELS = 'IEEE 802.15.4t 10.1.2.6: channels 15 to 56 at 250 kbit/s';
const MEMORY = 'from memory, no source found';
const NO_SOURCE = 'no source found: supply it';

type Sources = Readonly<Record<PhyConstant, string>>;

const OQPSK_AND_BPSK: Sources = {
  bitRateBps: `${NS3}; ${ZEPHYR}`,
  bitsPerSymbol: `${NS3}; ${RIOT}`,
  macSymbolS: `${NS3}; ${ZEPHYR}`,
  shrOctets: `${NS3}: preamble 4 octets, start-of-frame delimiter 1`,
  phrOctets: NS3,
  maxPsduOctets: `aMaxPHYPacketSize: ${NS3}; ${RIOT}`,
  turnaroundS: `aTurnaroundTime, 12 symbols: ${NS3}; ${RIOT}`,
  ccaS: `aCcaTime, 8 symbols: ${ZEPHYR}; ${RIOT}`,
  unitBackoffS: `aUnitBackoffPeriod, 12 + 8 symbols: ${NS3}; ${ZEPHYR}`,
  ackWaitS: `macAckWaitDuration: ${NS3}; ${RIOT} (54 symbols at O-QPSK). Some stacks use their own waits (16 ms, or 400 µs until detection); the standard's formula is taken, because the waits are software limits`,
  sifsS: `macSIFSPeriod, 12 symbols: ns-3 src/lr-wpan/test/lr-wpan-ifs-test.cc @1406464; ${RIOT}`,
  lifsS: `macLIFSPeriod, 40 symbols: ns-3 src/lr-wpan/test/lr-wpan-ifs-test.cc @1406464; ${RIOT}`,
};

const MSK: Sources = {
  bitRateBps: MSK_CHANNELS,
  bitsPerSymbol: 'one bit per symbol is a property of minimum-shift keying',
  macSymbolS: `${MEMORY}; the data symbol of 4 µs is taken`,
  shrOctets: NO_SOURCE,
  phrOctets: NO_SOURCE,
  maxPsduOctets: MEMORY,
  turnaroundS: `aTurnaroundTime, 12 symbols: ${NS3}; that MSK keeps the number is ${MEMORY}`,
  ccaS: `aCcaTime, 8 symbols: ${ZEPHYR}; that MSK keeps the number is ${MEMORY}`,
  unitBackoffS: `aUnitBackoffPeriod, 12 + 8 symbols: ${NS3}; that MSK keeps the number is ${MEMORY}`,
  ackWaitS: `${NO_SOURCE}; it depends on the synchronisation header`,
  sifsS: `macSIFSPeriod, 12 symbols: ${NS3}; that MSK keeps the number is ${MEMORY}`,
  lifsS: `macLIFSPeriod, 40 symbols: ${NS3}; that MSK keeps the number is ${MEMORY}`,
};

const SUN_FSK: Sources = {
  bitRateBps: `${RIOT}; band and operating mode of 100 to 200 kbit/s ${MEMORY}`,
  bitsPerSymbol: 'two-level frequency-shift keying, uncoded: one bit per symbol',
  macSymbolS: `symbol of operating mode 1 (50 kbit/s) at every rate: IEEE 802.15.4x 20.1; ${ZEPHYR} Table 19-1; ${RIOT}`,
  shrOctets: `start-of-frame delimiter 2 octets: ${RIOT}. phyFskPreambleLength ranges from 4 to 1000 octets (${MEMORY}); 4 is taken, as in public examples of the profile; one 50 kbit/s driver sends 3`,
  phrOctets: RIOT,
  maxPsduOctets: `${ZEPHYR}; ${RIOT}`,
  turnaroundS: `1 ms = 50 symbols: ${ZEPHYR}; ${RIOT}`,
  ccaS: `aCcaTime, 8 symbols of 20 µs: ${ZEPHYR}; ${RIOT}`,
  unitBackoffS: `58 symbols, not in the 920 MHz band: ${ZEPHYR}`,
  ackWaitS: NO_SOURCE,
  sifsS: `12 symbols (240 µs) or aTurnaroundTime (1 ms): sources leave it open; 1 ms is taken, the longer one and the acknowledgement space of a public stack`,
  lifsS: NO_SOURCE,
};

/** Microseconds as the double nearest to the decimal in seconds. */
const us = (microseconds: number): number => microseconds / 1e6;

interface Row {
  bitRateBps: number;
  bitsPerSymbol: number;
  macSymbolUs: number;
  shrOctets: number | null;
  phrOctets: number | null;
  maxPsduOctets: number;
  turnaroundUs: number;
  ackWaitUs: number | null;
  sifsUs: number;
  lifsUs: number | null;
  sources: Sources;
}

function preset(id: PhyId, row: Row): Phy {
  const { bitRateBps, bitsPerSymbol, shrOctets, phrOctets, maxPsduOctets, sources } = row;
  const ccaUs = 8 * row.macSymbolUs;
  return {
    id,
    bitRateBps,
    bitsPerSymbol,
    bitS: 1 / bitRateBps,
    symbolS: bitsPerSymbol / bitRateBps,
    macSymbolS: us(row.macSymbolUs),
    symbolsPerOctet: 8 / bitsPerSymbol,
    shrOctets,
    phrOctets,
    maxPsduOctets,
    turnaroundS: us(row.turnaroundUs),
    ccaS: us(ccaUs),
    unitBackoffS: us(row.turnaroundUs + ccaUs),
    ackWaitS: row.ackWaitUs === null ? null : us(row.ackWaitUs),
    sifsS: us(row.sifsUs),
    lifsS: row.lifsUs === null ? null : us(row.lifsUs),
    sources,
  };
}

/** O-QPSK and BPSK: all times in multiples of the data symbol. */
function symbolCounted(id: PhyId, bitRateBps: number, bitsPerSymbol: number): Phy {
  const symbolUs = (1e6 * bitsPerSymbol) / bitRateBps;
  const shrSymbols = 40 / bitsPerSymbol;
  const ackWaitSymbols = 20 + 12 + shrSymbols + Math.ceil((6 * 8) / bitsPerSymbol);
  return preset(id, {
    bitRateBps,
    bitsPerSymbol,
    macSymbolUs: symbolUs,
    shrOctets: 5,
    phrOctets: 1,
    maxPsduOctets: 127,
    turnaroundUs: 12 * symbolUs,
    ackWaitUs: ackWaitSymbols * symbolUs,
    sifsUs: 12 * symbolUs,
    lifsUs: 40 * symbolUs,
    sources: OQPSK_AND_BPSK,
  });
}

function sunFsk(id: PhyId, bitRateBps: number): Phy {
  return preset(id, {
    bitRateBps,
    bitsPerSymbol: 1,
    macSymbolUs: 20,
    shrOctets: 6,
    phrOctets: 2,
    maxPsduOctets: 2047,
    turnaroundUs: 1000,
    ackWaitUs: null,
    sifsUs: 1000,
    lifsUs: null,
    sources: SUN_FSK,
  });
}

/** The presets by id. */
export const phyPresets: Readonly<Record<PhyId, Phy>> = {
  'oqpsk-2450': symbolCounted('oqpsk-2450', 250_000, 4),
  'msk-2450': preset('msk-2450', {
    bitRateBps: 250_000,
    bitsPerSymbol: 1,
    macSymbolUs: 4,
    shrOctets: null,
    phrOctets: null,
    maxPsduOctets: 127,
    turnaroundUs: 12 * 4,
    ackWaitUs: null,
    sifsUs: 12 * 4,
    lifsUs: 40 * 4,
    sources: MSK,
  }),
  'oqpsk-915': symbolCounted('oqpsk-915', 250_000, 4),
  'oqpsk-868': symbolCounted('oqpsk-868', 100_000, 4),
  'bpsk-868': symbolCounted('bpsk-868', 20_000, 1),
  'bpsk-915': symbolCounted('bpsk-915', 40_000, 1),
  'sun-fsk-50': sunFsk('sun-fsk-50', 50_000),
  'sun-fsk-100': sunFsk('sun-fsk-100', 100_000),
  'sun-fsk-150': sunFsk('sun-fsk-150', 150_000),
  'sun-fsk-200': sunFsk('sun-fsk-200', 200_000),
};
