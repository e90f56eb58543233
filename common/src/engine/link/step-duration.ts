import { EngineError, InconsistentInputError, OutOfRangeError } from '#common/errors.ts';
import type { EngineErrorDetails } from '#common/errors.ts';
import type { NodeRemark } from '../node/node-program.types.ts';
import type { ExchangeDuration, LinkSettings, Step } from '../scenario/scenario.types.ts';
import { requireNumber } from './checks.ts';
import { exchangeAirtime } from './exchange-airtime.ts';
import { serialTransferS } from './serial-transfer.ts';

/** How long a step takes. */
export interface StepDuration {
  /** Mean duration, s, all repeats together, unrounded. */
  meanS: number;
  /** The same as terms whose shortest decimals add up exactly. */
  termsS: number[];
  /** That parts of an exchange are not counted; null otherwise. */
  remark: NodeRemark | null;
}

const FRAME_FIELDS = new Set(
  'frameVersion,panIdCompression,sequenceNumber,securityLevel,keyIdMode,frameCounterSuppressed,informationElementOctets,fcsOctets'.split(
    ',',
  ),
);
/** Fields of the link settings; a header that the PHY leaves open is given by another PHY. */
const LINK_FIELDS = new Map([
  ['preambleOctets', 'preambleOctets'],
  ['forwardErrorCorrection', 'forwardErrorCorrection'],
  ['shrOctets', 'phy'],
  ['phrOctets', 'phy'],
  ['link.phy', 'phy'],
]);

/**
 * Mean duration of a step: typed, of a serial transfer, or the airtime of an exchange's main frame.
 *
 * A typed duration in whole microseconds times its repeats is exact: the double returned is the one nearest to the decimal.
 *
 * @param step The step.
 * @param nodeLink Link settings of the node, the defaults of the step's own.
 * @param path Path of the step in the input, for errors and remarks, such as `node.routines[0].steps[1]`.
 * @returns Duration of all repeats, s, and a remark code `link-airtime-only` where parts of an exchange are not counted.
 * @throws OutOfRangeError for figures outside their range, such as a frame that is too long.
 * @throws InconsistentInputError for an exchange whose airtime cannot be told; the field is a path into the input.
 * @example stepDuration({ id: 's', name: 'S', states: {}, duration: { kind: 'fixed', typical: 0.1 }, repeats: 3 }).meanS // 0.3
 */
export function stepDuration(step: Step, nodeLink: LinkSettings = {}, path = ''): StepDuration {
  const { duration, repeats = 1 } = step;
  // Most steps are typed and right: no path is put together for those, since this runs on each keystroke.
  if (duration.kind === 'fixed' && isTime(duration.typical) && isCount(repeats)) {
    return whole(repeatedS(duration.typical, repeats), null);
  }
  const prefix = path === '' ? '' : `${path}.`;
  requireNumber(repeats, { field: `${prefix}repeats`, min: 1, whole: true });
  const field = `${prefix}duration`;
  if (duration.kind === 'fixed') {
    return whole(requireNumber(duration.typical, { field: `${field}.typical`, min: 0, unit: 's' }), null);
  }
  if (duration.kind === 'serial') {
    return rebased(field, undefined, () => whole(serialTransferS(duration) * repeats, null));
  }
  const link = mergedLink(nodeLink, duration.link);
  const { airtimeS, notCounted } = rebased(field, duration.link, () => exchangeAirtime(duration, link));
  return whole(airtimeS * repeats, notCounted === null ? null : airtimeOnly(step.name, field, notCounted, duration));
}

function isTime(timeS: number): boolean {
  return timeS >= 0 && timeS < Infinity;
}

function isCount(count: number): boolean {
  return Number.isInteger(count) && count >= 1;
}

function whole(meanS: number, remark: NodeRemark | null): StepDuration {
  return { meanS, termsS: [meanS], remark };
}

/** A whole number of microseconds stays one, so that 3 · 0.1 s are 0.3 s and not the next double. */
function repeatedS(durationS: number, repeats: number): number {
  const microseconds = Math.round(durationS * 1e6);
  return microseconds / 1e6 === durationS ? (microseconds * repeats) / 1e6 : durationS * repeats;
}

function mergedLink(nodeLink: LinkSettings, stepLink: LinkSettings | undefined): LinkSettings {
  if (stepLink === undefined) return nodeLink;
  const merged = { ...nodeLink, ...stepLink };
  return nodeLink.frame && stepLink.frame ? { ...merged, frame: { ...nodeLink.frame, ...stepLink.frame } } : merged;
}

function airtimeOnly(name: string, path: string, notCounted: string, { pattern }: ExchangeDuration): NodeRemark {
  const message = `The step "${name}" (${pattern}) counts the airtime of its main frame only. Not counted: ${notCounted}.`;
  return { code: 'link-airtime-only', message, path };
}

/** Runs a computation whose errors name bare fields, and makes those fields paths into the input. */
function rebased<T>(path: string, stepLink: LinkSettings | undefined, compute: () => T): T {
  try {
    return compute();
  } catch (error) {
    if (!(error instanceof EngineError)) throw error;
    const details: EngineErrorDetails = {
      code: error.code,
      field: fieldPath(path, stepLink, error.field),
      value: error.value,
      relatedFields: error.relatedFields.map((related) => fieldPath(path, stepLink, related)),
      ...(error.unit === undefined ? {} : { unit: error.unit }),
      ...(error.expected === undefined ? {} : { expected: error.expected }),
    };
    if (error instanceof OutOfRangeError) throw new OutOfRangeError(error.message, details, { cause: error });
    throw new InconsistentInputError(error.message, details, { cause: error });
  }
}

function fieldPath(path: string, stepLink: LinkSettings | undefined, field: string): string {
  if (field === '') return path;
  if (FRAME_FIELDS.has(field)) return `${stepLink?.frame ? `${path}.link` : 'node.link'}.frame.${field}`;
  const linkField = LINK_FIELDS.get(field);
  return linkField === undefined ? `${path}.${field}` : `${stepLink ? `${path}.link` : 'node.link'}.${linkField}`;
}
