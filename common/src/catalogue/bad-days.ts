import { exchangePlan } from '#common/engine/link/exchange-plan.ts';
import { linkOf } from '#common/engine/link/link-of.ts';
import type {
  ExchangePattern,
  LinkSettings,
  Node,
  Part,
  Provenance,
  Routine,
  Schedule,
  StateRole,
  Step,
} from '#common/engine/scenario/scenario.types.ts';
import { EngineError } from '#common/errors.ts';
import { perDayOf } from '#common/units/per-year.ts';
import { typedFigure } from './typed-figure.ts';

export type BadDayId = 'lost-parent' | 'firmware-update' | 'install-day';

/** A day out of the ordinary, as one chooses it. */
export interface BadDay {
  id: BadDayId;
  name: string;
  /** What happens, and what is taken for it. */
  description: string;
  /** How often to begin with; null: once in a life, at its beginning. */
  timesAYear: number | null;
}

/** What a bad day becomes on a node. */
export interface BadDayRoutine {
  /** The routine, still without ids that are unique in the node; null where something is missing. */
  routine: Omit<Routine, 'id'> | null;
  /** What the node lacks, in words. */
  missing: string[];
}

/** Days out of the ordinary that a node has to survive beside its routine ones. */
export const BAD_DAYS: readonly BadDay[] = [
  {
    id: 'lost-parent',
    name: 'Lost parent',
    description:
      'Four reports in a row stay unanswered, two scans of all channels with a pause of 30 s between them, then joining again.',
    timesAYear: 12,
  },
  {
    id: 'firmware-update',
    name: 'Firmware update',
    description:
      '256 KiB in 4,096 blocks of 64 octets, each received and acknowledged, 64 flash sectors of 4 KiB written, then a check and a restart.',
    timesAYear: 2,
  },
  {
    id: 'install-day',
    name: 'Install day',
    description:
      'Once, at the beginning: self-test, scan of all channels, 30 s of listening while paired, joining, and eight test reports while the place is found.',
    timesAYear: null,
  },
];

const TYPICAL: Provenance = { kind: 'typical', text: 'Usual for such a day, from memory; of no particular product' };

/**
 * The routine that a bad day becomes on a node: its radio and controller, times on the air from its link. The days happen at
 * random, or once at the beginning of life.
 *
 * Source: course of such days from memory, no source; four reports without an answer after aMaxLostBeacons of IEEE 802.15.4.
 *
 * @param node The node.
 * @param id Which day.
 * @param timesAYear How often a year, 0 or more; of no effect on what happens once.
 * @returns The routine, or what the node lacks for it.
 * @example badDayRoutine(node, 'firmware-update', 2).missing // []
 */
export function badDayRoutine(node: Node, id: BadDayId, timesAYear: number): BadDayRoutine {
  const radio = node.parts.find(({ kind }) => kind === 'radio');
  const controller = node.parts.find(({ kind }) => kind === 'controller');
  const { name = id, timesAYear: usual = null } = BAD_DAYS.find((day) => day.id === id) ?? {};
  const missing = lacking(radio, controller, node.link);
  if (!radio || !controller || missing.length > 0) return { routine: null, missing };
  const hasOthers = node.parts.filter(({ kind }) => kind === 'radio').length > 1;
  const tools = toolsOf(controller, hasOthers ? radio.id : undefined);
  const steps = STEPS[id](tools, channelsOf(node.link));
  const problems = planProblems(steps, node.link);
  if (problems.length > 0) return { routine: null, missing: problems };
  const schedule: Schedule =
    usual === null ? { kind: 'once', afterS: 0 } : { kind: 'random', meanPerDay: perDayOf(timesAYear) };
  return { routine: { name, enabled: true, schedule, steps }, missing: [] };
}

const RADIO_ROLES: readonly { roles: readonly StateRole[]; words: string }[] = [
  { roles: ['transmit'], words: 'transmit' },
  { roles: ['receive', 'listen'], words: 'receive' },
];

function lacking(radio: Part | undefined, controller: Part | undefined, link: LinkSettings | undefined): string[] {
  const missing: string[] = [];
  if (!radio) missing.push('a part of kind radio');
  for (const { roles, words } of radio ? RADIO_ROLES : []) {
    const isThere = radio?.states.some(({ role }) => role !== undefined && roles.includes(role));
    if (!isThere) missing.push(`a state of “${radio?.name ?? ''}” with the role “${words}”`);
  }
  if (!controller) missing.push('a part of kind controller');
  else if (!stateOf(controller, 'active')) missing.push(`a state of “${controller.name}” other than rest`);
  if (link?.phy === undefined) missing.push('a PHY in the link settings of the node');
  return missing;
}

/** Why an exchange of the day cannot be told with this link, such as a constant that no source gives. */
function planProblems(steps: readonly Step[], link: LinkSettings | undefined): string[] {
  const problems = new Set<string>();
  for (const { duration } of steps) {
    if (duration.kind !== 'exchange') continue;
    try {
      exchangePlan(duration, linkOf(link, duration.link));
    } catch (error) {
      if (!(error instanceof EngineError)) throw error;
      problems.add(`what “${duration.pattern}” needs: ${error.message}`);
    }
  }
  return [...problems];
}

/** The state with a role, else the first one that is not rest. */
function stateOf(part: Part, role: StateRole): string | undefined {
  const awake = part.states.filter(({ id }) => id !== part.restStateId);
  return (awake.find((state) => state.role === role) ?? awake[0])?.id;
}

interface Tools {
  /** A step on the air; the controller waits. */
  air: (id: string, name: string, exchange: ExchangePattern & { link?: LinkSettings }, repeats?: number) => Step;
  /** A step in which the controller works. */
  work: (id: string, name: string, time: string, repeats?: number) => Step;
  /** A step in which everything rests. */
  pause: (id: string, name: string, time: string) => Step;
}

function toolsOf(controller: Part, radioPartId: string | undefined): Tools {
  const waiting = { [controller.id]: stateOf(controller, 'idle') ?? controller.restStateId };
  const working = { [controller.id]: stateOf(controller, 'active') ?? controller.restStateId };
  const times = (repeats: number | undefined): Pick<Step, 'repeats'> => (repeats === undefined ? {} : { repeats });
  const typed = (time: string): Step['duration'] => ({ kind: 'fixed', ...typedFigure('duration', time, TYPICAL) });
  return {
    air: (id, name, exchange, repeats) => ({
      id,
      name,
      states: waiting,
      duration: { kind: 'exchange', ...exchange, ...(radioPartId === undefined ? {} : { radioPartId }) },
      ...times(repeats),
    }),
    work: (id, name, time, repeats) => ({ id, name, states: working, duration: typed(time), ...times(repeats) }),
    pause: (id, name, time) => ({ id, name, states: {}, duration: typed(time) }),
  };
}

const certainly = { typical: 1, provenance: TYPICAL };
const SCAN_DURATION = 3;
/** aTurnaroundTime of the 2.4 GHz PHY stands for the change of channel. */
const RETUNE_S = 0.000_192;

/** Channels of a scan: those of the PHY's page 0, one where it has but one. */
function channelsOf(link: LinkSettings | undefined): number {
  const phy = typeof link?.phy === 'string' ? link.phy : '';
  if (phy.endsWith('868')) return 1;
  return phy.endsWith('915') ? 10 : 16;
}

const scan = (tools: Tools, id: string, name: string, channels: number): Step =>
  tools.air(id, name, { pattern: 'scan', channels, scanDuration: SCAN_DURATION, retuneS: RETUNE_S });

const join = (tools: Tools): Step[] => [
  tools.air('ask-to-join', 'Ask to join', { pattern: 'unacknowledged', payloadOctets: 12 }),
  tools.air('joined', 'Receive the answer', { pattern: 'receive', payloadOctets: 20, listenS: 0.5 }),
  tools.work('keys', 'Make the keys', '50 … 150 … 400 ms'),
];

const STEPS: Readonly<Record<BadDayId, (tools: Tools, channels: number) => Step[]>> = {
  'lost-parent': (tools, channels) => [
    tools.air(
      'unanswered',
      'Report in vain',
      {
        pattern: 'acknowledged',
        payloadOctets: 24,
        link: { frameErrorRate: certainly },
      },
      4,
    ),
    scan(tools, 'first-scan', 'Scan in vain', channels),
    tools.pause('back-off', 'Back off', '20 … 30 … 60 s'),
    scan(tools, 'second-scan', 'Scan again', channels),
    ...join(tools),
  ],
  'firmware-update': (tools) => [
    tools.air('blocks', 'Receive the blocks', { pattern: 'receive', payloadOctets: 64, listenS: 0.004 }, 4_096),
    tools.work('flash', 'Write a flash sector', '40 … 85 … 200 ms', 64),
    tools.work('check', 'Check and restart', '1 … 2 … 4 s'),
  ],
  'install-day': (tools, channels) => [
    tools.work('self-test', 'Self-test', '1 … 2 … 5 s'),
    scan(tools, 'scan', 'Scan all channels', channels),
    tools.air('pairing', 'Listen while paired', { pattern: 'receive', payloadOctets: 40, listenS: 30 }),
    ...join(tools),
    tools.air('test-reports', 'Test reports', { pattern: 'acknowledged', payloadOctets: 24 }, 8),
  ],
};
