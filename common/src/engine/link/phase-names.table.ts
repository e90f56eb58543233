import type { StateRole } from '../scenario/scenario.types.ts';
import type { PhaseId } from './exchange-plan.types.ts';

/** Name of each phase in words, and the role that the radio has in it unless the pattern says otherwise. */
export const phaseNames: Readonly<Record<PhaseId, { name: string; role: StateRole }>> = {
  'crystal-start': { name: 'start of the crystal', role: 'idle' },
  loading: { name: 'loading of the frame', role: 'idle' },
  guard: { name: 'guard before the expected frame', role: 'listen' },
  retune: { name: 'change of channel', role: 'synthesiser' },
  backoff: { name: 'backoff', role: 'idle' },
  assessment: { name: 'assessment of the channel', role: 'listen' },
  turnaround: { name: 'turnaround before the frame', role: 'synthesiser' },
  'wake-up': { name: 'wake-up frames', role: 'transmit' },
  frame: { name: 'frame', role: 'transmit' },
  'acknowledgement-wait': { name: 'wait for the acknowledgement', role: 'listen' },
  acknowledgement: { name: 'acknowledgement', role: 'receive' },
  'response-wait': { name: 'wait for the response', role: 'listen' },
  response: { name: 'response', role: 'receive' },
  'response-acknowledgement': { name: 'acknowledgement of the response', role: 'transmit' },
  listen: { name: 'listening', role: 'listen' },
  'window-1': { name: 'first receive window', role: 'listen' },
  'window-2': { name: 'second receive window', role: 'listen' },
  'interframe-space': { name: 'interframe space', role: 'idle' },
};
