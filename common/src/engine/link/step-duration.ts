import { EngineError, InconsistentInputError, OutOfRangeError } from '#common/errors.ts';
import type { EngineErrorDetails } from '#common/errors.ts';
import type { NodeRemark } from '../node/node-program.types.ts';
import type { ExchangeDuration, LinkSettings, Step } from '../scenario/scenario.types.ts';
import { requireNumber } from './checks.ts';
import { exchangePlan } from './exchange-plan.ts';
import type { ExchangePlan } from './exchange-plan.types.ts';
import { linkOf } from './link-of.ts';
import { serialTransferS } from './serial-transfer.ts';
import { PHY_CONSTANTS } from './phy-constant.ts';

/** How long a step takes. */
export interface StepDuration {
  /** Mean duration, s, all repeats together, unrounded. */
  meanS: number;
  /** The same as terms whose shortest decimals add up exactly. */
  termsS: number[];
  /** Cautions of an exchange's plan; none otherwise. */
  remarks: NodeRemark[];
}

const FRAME_FIELDS = new Set(
  'frameVersion,panIdCompression,sequenceNumber,securityLevel,keyIdMode,frameCounterSuppressed,informationElementOctets,fcsOctets'.split(
    ',',
  ),
);
const LINK_FIELDS = new Set(
  [
    'preambleOctets,forwardErrorCorrection,busyProbability,frameErrorRate,ackErrorRate,receivedLevelDbm,receivedLevelStepDb',
    'sensitivityDbm,noiseDbm,macMinBE,macMaxBE,macMaxCSMABackoffs,macMaxFrameRetries,phy',
  ]
    .join(',')
    .split(','),
);
/** Constants that a PHY leaves open are given beside it, the spaces by another PHY. */
const CONSTANT_FIELDS = new Set<string>(PHY_CONSTANTS);
const PHY_FIELDS = new Set(['sifsS', 'lifsS']);

/**
 * Mean duration of a step: typed, of a serial transfer, or of an exchange's plan.
 *
 * A typed duration in whole microseconds times its repeats is exact: the double returned is the one nearest to the decimal.
 *
 * @param step The step.
 * @param nodeLink Link settings of the node, the defaults of the step's own.
 * @param path Path of the step in the input, for errors and remarks, such as `node.routines[0].steps[1]`.
 * @returns Duration of all repeats, s, and what must be said of an exchange.
 * @throws OutOfRangeError for figures outside their range, such as a frame that is too long.
 * @throws InconsistentInputError for an exchange whose plan cannot be told; the field is a path into the input.
 * @example stepDuration({ id: 's', name: 'S', states: {}, duration: { kind: 'fixed', typical: 0.1 }, repeats: 3 }).meanS // 0.3
 */
export function stepDuration(step: Step, nodeLink: LinkSettings = {}, path = ''): StepDuration {
  const { duration, repeats = 1 } = step;
  // Most steps are typed and right: no path is put together for those, since this runs on each keystroke.
  if (duration.kind === 'fixed' && isTime(duration.typical) && isCount(repeats)) {
    return whole(repeatedS(duration.typical, repeats));
  }
  const prefix = path === '' ? '' : `${path}.`;
  requireNumber(repeats, { field: `${prefix}repeats`, min: 1, whole: true });
  const field = `${prefix}duration`;
  if (duration.kind === 'fixed') {
    return whole(requireNumber(duration.typical, { field: `${field}.typical`, min: 0, unit: 's' }));
  }
  if (duration.kind === 'serial') {
    return rebased({ path: field, nodeLink, stepLink: undefined }, () => whole(serialTransferS(duration) * repeats));
  }
  const { plan, remarks } = stepPlan(duration, { nodeLink, path });
  return { meanS: plan.meanS * repeats, termsS: [plan.meanS * repeats], remarks };
}

/** An exchange step's plan, and its cautions with paths into the input. */
export interface StepPlan {
  plan: ExchangePlan;
  remarks: NodeRemark[];
}

/**
 * Plan of an exchange step, one exchange of its repeats.
 *
 * @param exchange Duration of the step.
 * @param where Link settings of the node, the defaults of the step's own, and the step's path in the input.
 * @returns The plan, and its cautions as remarks.
 * @throws What `exchangePlan` throws; the field is a path into the input.
 * @example stepPlan(exchange, { nodeLink: node.link, path: 'node.routines[0].steps[1]' }).plan.meanS
 */
export function stepPlan(
  exchange: ExchangeDuration,
  { nodeLink, path }: { nodeLink: LinkSettings | undefined; path: string },
): StepPlan {
  const place = { path: path === '' ? 'duration' : `${path}.duration`, nodeLink, stepLink: exchange.link };
  const plan = rebased(place, () => exchangePlan(exchange, linkOf(nodeLink, exchange.link)));
  const remarks = plan.cautions.map(({ code, message, field }) => ({ code, message, path: cautionPath(place, field) }));
  return { plan, remarks };
}

/** A setting that neither step nor node gives is one of the node: there it serves all steps. */
function cautionPath(place: Place, field: string): string {
  if (!field.startsWith('link.')) return fieldPath(place, field);
  const name = field.slice('link.'.length).split('.')[0] ?? '';
  return place.stepLink && Object.hasOwn(place.stepLink, name) ? `${place.path}.${field}` : `node.${field}`;
}

function isTime(timeS: number): boolean {
  return timeS >= 0 && timeS < Infinity;
}

function isCount(count: number): boolean {
  return Number.isInteger(count) && count >= 1;
}

function whole(meanS: number): StepDuration {
  return { meanS, termsS: [meanS], remarks: [] };
}

/** A whole number of microseconds stays one, so that 3 · 0.1 s are 0.3 s and not the next double. */
function repeatedS(durationS: number, repeats: number): number {
  const microseconds = Math.round(durationS * 1e6);
  return microseconds / 1e6 === durationS ? (microseconds * repeats) / 1e6 : durationS * repeats;
}

/** Where an exchange and its link settings stand in the input. */
interface Place {
  path: string;
  nodeLink: LinkSettings | undefined;
  stepLink: LinkSettings | undefined;
}

/** Runs a computation whose errors name bare fields, and makes those fields paths into the input. */
function rebased<T>(place: Place, compute: () => T): T {
  try {
    return compute();
  } catch (error) {
    if (!(error instanceof EngineError)) throw error;
    const details: EngineErrorDetails = {
      code: error.code,
      field: fieldPath(place, error.field),
      value: error.value,
      relatedFields: error.relatedFields.map((related) => fieldPath(place, related)),
      ...(error.unit === undefined ? {} : { unit: error.unit }),
      ...(error.expected === undefined ? {} : { expected: error.expected }),
    };
    if (error instanceof OutOfRangeError) throw new OutOfRangeError(error.message, details, { cause: error });
    throw new InconsistentInputError(error.message, details, { cause: error });
  }
}

function fieldPath(place: Place, field: string): string {
  if (field === '') return place.path;
  if (FRAME_FIELDS.has(field)) return linkPath(place, `frame.${field}`);
  if (LINK_FIELDS.has(field)) return linkPath(place, field);
  if (CONSTANT_FIELDS.has(field)) return linkPath(place, `phyConstants.${field}`);
  if (PHY_FIELDS.has(field)) return linkPath(place, 'phy');
  if (field.startsWith('crystal.')) return linkPath(place, field);
  if (field.startsWith('link.')) return linkPath(place, field.slice('link.'.length));
  return `${place.path}.${field}`;
}

/** The step's settings where they give the field, or where the node's do not either. */
function linkPath({ path, nodeLink = {}, stepLink }: Place, field: string): string {
  const name = field.split('.')[0] ?? field;
  const isOfStep = stepLink !== undefined && (Object.hasOwn(stepLink, name) || !Object.hasOwn(nodeLink, name));
  return `${isOfStep ? `${path}.link` : 'node.link'}.${field}`;
}
