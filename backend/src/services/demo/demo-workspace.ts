import { COLD_STORE_LOGGER } from './cold-store-logger.ts';
import type { DemoWorkspace } from './demo.types.ts';
import { FROST_POST } from './frost-post.ts';
import { GATE_COUNTER } from './gate-counter.ts';
import { SOIL_PROBE } from './soil-probe.ts';

/** Tarnfold Orchards, which does not exist, watches for frost with four kinds of nodes. */
export const demoWorkspace: DemoWorkspace = {
  name: 'Tarnfold Orchards',
  projects: [FROST_POST, SOIL_PROBE, GATE_COUNTER, COLD_STORE_LOGGER],
};
