import { InconsistentInputError } from '#common/errors.ts';
import { formatShare } from '#common/units/format-quantity.ts';
import type { ExchangeDuration, LinkSettings, PhyConstants, Quantity } from '../scenario/scenario.types.ts';
import { requireNumber } from './checks.ts';
import type { ExchangeFigure, PlanCaution } from './exchange-plan.types.ts';
import { linkDefaults } from './link-defaults.table.ts';
import type { LinkDefault, LinkDefaultId } from './link-defaults.table.ts';
import { PHY_CONSTANTS } from './phy-constant.ts';
import { phyOf } from './phy-of.ts';
import type { Phy } from './phy.types.ts';

/** What the plans of all patterns share; cautions and figures are collected in the order in which they come up. */
export interface PlanContext<E extends ExchangeDuration = ExchangeDuration> {
  exchange: E;
  /** Settings that hold for the step, those of the node filled in. */
  link: LinkSettings;
  cautions: PlanCaution[];
  figures: ExchangeFigure[];
}

/** Context of the plan of a pattern. */
export type PlanOf<P extends ExchangeDuration['pattern']> = PlanContext<Extract<ExchangeDuration, { pattern: P }>>;

/**
 * The PHY of a plan.
 *
 * @param link Its link settings.
 * @returns The PHY.
 * @throws InconsistentInputError code `phy-missing` where neither step nor node chooses one.
 * @example planPhy({ phy: 'oqpsk-2450' }).bitRateBps // 250000
 */
export function planPhy(link: LinkSettings): Phy {
  if (link.phy !== undefined) return withConstants(phyOf(link.phy), link.phyConstants);
  throw new InconsistentInputError('The airtime of a frame needs a PHY; choose one for the step or the node.', {
    code: 'phy-missing',
    field: 'link.phy',
    expected: 'a PHY preset or a PHY of your own',
  });
}

/** A PHY with the constants that the scenario gives in place of its own. */
function withConstants(phy: Phy, given: PhyConstants | undefined): Phy {
  if (given === undefined) return phy;
  const sources = { ...phy.sources };
  for (const name of PHY_CONSTANTS) if (given[name] !== undefined) sources[name] = 'given in the scenario';
  return { ...phy, ...given, sources };
}

const assumedWords = ({ value, words, source }: LinkDefault): string =>
  `Nothing says how likely it is ${words}: ${formatShare(value)} is assumed (${source}).`;

const ASSUMED: Readonly<Record<LinkDefaultId, string>> = {
  busyProbability: assumedWords(linkDefaults.busyProbability),
  frameErrorRate: assumedWords(linkDefaults.frameErrorRate),
  ackErrorRate: assumedWords(linkDefaults.ackErrorRate),
  pendingProbability: assumedWords(linkDefaults.pendingProbability),
  missedBeaconProbability: assumedWords(linkDefaults.missedBeaconProbability),
  scanRequestProbability: assumedWords(linkDefaults.scanRequestProbability),
};

/**
 * A probability of the link: as given, else assumed, which is a figure with its source and a caution `link-assumed`.
 *
 * @param context Gets figure and caution.
 * @param id Which one.
 * @param given What the scenario gives, and the field it stands in, for errors and cautions.
 * @returns The probability.
 * @throws OutOfRangeError code `out-of-range` outside 0 to 1.
 * @example probabilityOf(context, 'busyProbability', { quantity: link.busyProbability, field: 'link.busyProbability' })
 */
export function probabilityOf(
  context: PlanContext,
  id: LinkDefaultId,
  { quantity, field }: { quantity: Quantity | undefined; field: string },
): number {
  const { value: assumed, words, source } = linkDefaults[id];
  const value = quantity === undefined ? assumed : requireNumber(quantity.typical, { field, min: 0, max: 1 });
  if (quantity === undefined) context.cautions.push({ code: 'link-assumed', message: ASSUMED[id], field });
  addFigure(context, {
    id,
    name: `Probability ${words}`,
    value,
    unit: 'probability',
    formula: quantity === undefined ? 'assumed' : 'as given',
    source: quantity === undefined ? source : 'given in the scenario',
  });
  return value;
}

/**
 * Adds a figure to a plan.
 *
 * @param context The plan's context.
 * @param figure The figure; one with an id that is there already is left out.
 * @example addFigure(context, { id: 'airtime', name: 'Airtime', value: 0.004, unit: 's', formula: '8·n/R', source: '…' })
 */
export function addFigure({ figures }: PlanContext, figure: ExchangeFigure): void {
  if (!figures.some(({ id }) => id === figure.id)) figures.push(figure);
}
