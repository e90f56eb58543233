/** The engine's public interface. Re-exports only; names and units here stay, because callers outside rely on them. */
export type * from './scenario/scenario.types.ts';
export type * from './node/node-program.types.ts';
export type * from './forecast/forecast.types.ts';

// link
export {
  acknowledgedExchange,
  unacknowledgedExchange,
  type AcknowledgedExchangeInput,
  type UnacknowledgedExchange,
  type UnacknowledgedExchangeInput,
} from './link/acknowledged-exchange.ts';
export {
  ADVERTISING_INTERVAL_UNIT_S,
  ADVERTISING_SPACE_S,
  advertisingEvent,
  advertisingPacketS,
  advertisingPeriodS,
  scannableEvent,
  type AdvertisingPhy,
  type ScannableEvent,
  type ScannableEventInput,
} from './link/advertising-event.ts';
export {
  bitErrorRate,
  frameLoss,
  SENSITIVITY_SINR_DB,
  steppedLevelDbm,
  type FrameLoss,
  type FrameLossInput,
} from './link/bit-error.ts';
export { chirpAirtimeS, isLowDataRate, networkPayloadOctets, type ChirpInput } from './link/chirp-airtime.ts';
export {
  chirpWindows,
  windowOpenS,
  type ChirpWindow,
  type ChirpWindows,
  type ChirpWindowsInput,
  type ReceiveWindow,
} from './link/chirp-windows.ts';
export { crystalCaution, crystalTolerance, phyLimitPpm, type CrystalTolerance } from './link/crystal.ts';
export { csmaCa, type BackoffSettings, type CsmaCa, type CsmaCaInput } from './link/csma-ca.ts';
export { dutyCycleBands, type DutyCycleBand } from './link/duty-cycle-bands.table.ts';
export {
  dutyCycleBandOf,
  dutyCycleCaution,
  dutyCycleLimit,
  type DutyCycleInput,
  type DutyCycleLimit,
} from './link/duty-cycle-limit.ts';
export type { AcknowledgedExchange, ExchangeInput, ExchangeParts } from './link/exchange-over-access.ts';
export { exchangePlan } from './link/exchange-plan.ts';
export type {
  ExchangeFigure,
  ExchangePhase,
  ExchangePlan,
  FrameField,
  FrameLayout,
  Origin,
  PhaseId,
  PlanCaution,
} from './link/exchange-plan.types.ts';
export { frameAirtimeS, type FrameAirtimeOptions } from './link/frame-airtime.ts';
export { guardWindow, longestResynchronisationS, type GuardInput, type GuardWindow } from './link/guard-window.ts';
export { interframeSpaceS } from './link/interframe-space.ts';
export { frameLayout, type FrameSize } from './link/frame-layout.ts';
export { frameLoading, type LoadingTimes } from './link/loading.ts';
export { linkDefaults, standardFrame, type LinkDefault, type LinkDefaultId } from './link/link-defaults.table.ts';
export { linkOf } from './link/link-of.ts';
export {
  listenBeforeTalk,
  type ChannelListInput,
  type ListenBeforeTalk,
  type ListenBeforeTalkInput,
} from './link/listen-before-talk.ts';
export { macHeader, type MacHeader, type MacHeaderInput } from './link/mac-header.ts';
export {
  overhear,
  receptionOf,
  type OverhearInput,
  type ReceptionInput,
  type ReceptionTimes,
} from './link/overhearing.ts';
export { maxFrameTotalWaitS } from './link/max-frame-total-wait.ts';
export { phyOf } from './link/phy-of.ts';
export { phyPresets } from './link/phy.table.ts';
export type { Phy, PhyConstant } from './link/phy.types.ts';
export { poll, type Poll, type PollInput, type PollResponse } from './link/poll.ts';
export {
  sampledListening,
  sampledSender,
  synchronisedWindow,
  WAKE_UP_PSDU_OCTETS,
  type SampledListening,
  type SampledListeningInput,
  type SampledSender,
  type SampledSenderInput,
  type SharedPhase,
  type SynchronisedWindowInput,
} from './link/sampled-listening.ts';
export { BEACON_REQUEST_PSDU_OCTETS, scanTimes, type ScanInput, type ScanTimes } from './link/scan.ts';
export { serialTransferS } from './link/serial-transfer.ts';
export { sharedSlots, type SharedSlots, type SharedSlotsInput } from './link/shared-slots.ts';
export { SLOT_TEMPLATE_CONFLICT, slotTemplates, type SlotTemplate } from './link/slot-templates.table.ts';
export { slot, slotTemplateOf, type Slot, type SlotInput, type SlotTimes } from './link/slot.ts';
export { stepDuration, type StepDuration } from './link/step-duration.ts';
export {
  beaconTracking,
  superframe,
  type BeaconTracking,
  type BeaconTrackingInput,
  type Superframe,
  type SuperframeInput,
} from './link/superframe.ts';
// node
export { chargeLedger, exactDrawAt, type ChargeLedgerOptions } from './node/charge-ledger.ts';
export { compileNode } from './node/compile-node.ts';
export { drawAt, type DrawConditions } from './node/draw.ts';
export { dutyShares, oversubscription, type DutyShare, type Oversubscription } from './node/duty-shares.ts';
export { exactDurationS, ledgerLines, type LedgerLine } from './node/ledger-lines.ts';
export { meanCurrentA } from './node/mean-current.ts';
export { cyclesPerDay, exactCyclesPerDay, isOnAt, isOnInMonth, monthsOn } from './node/schedule-rate.ts';
// supply
export { capacityAtCurrentC } from './supply/capacity-at-current.ts';
export {
  capacityTemperatureFactor,
  freshResistanceOhm,
  openCircuitV,
  resistanceTemperatureFactor,
} from './supply/cell-figures.ts';
export { constantPowerA } from './supply/constant-power.ts';
export { packOf, type PackFactors } from './supply/pack-of.ts';
export { regulatorInputA, type RegulatorInput } from './supply/regulator-input.ts';
export { selfDischargeLifeS } from './supply/self-discharge-life.ts';
export { selfDischargeRatePerS, type SelfDischargeRateInput } from './supply/self-discharge-rate.ts';
export { standardDeviation } from './supply/standard-deviation.ts';
export { tableValue } from './supply/table-value.ts';
export { usableChargeC, type UsableChargeInput } from './supply/usable-charge.ts';
// climate
export { dekadsOfYear, DEKAD_S, type CalendarDekad } from './climate/dekads.ts';
export { winterStartMonth, wintersPassed } from './climate/winters.ts';
// forecast
export { ENGINE_VERSION } from './forecast/engine-version.ts';
export { forecast } from './forecast/forecast.ts';
export { quantisedThresholdV } from './forecast/warning.ts';
