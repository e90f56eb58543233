/** The engine's public interface. Re-exports only; names and units here stay, because callers outside rely on them. */
export type * from './scenario/scenario.types.ts';
export type * from './node/node-program.types.ts';
export type * from './forecast/forecast.types.ts';

// link
// node
export { exactDurationS, ledgerLines, type LedgerLine } from './node/ledger-lines.ts';
// supply, climate
// forecast
