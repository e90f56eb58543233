import type { LinkSettings } from '../scenario/scenario.types.ts';

/**
 * Link settings that hold for a step: those of the node, with what the step gives in their place; the frame format, the crystal and
 * the constants of the PHY field by field.
 *
 * @param nodeLink Settings of the node.
 * @param stepLink Settings of the step.
 * @returns The settings, defaults of the engine not filled in.
 * @example linkOf({ phy: 'oqpsk-2450' }, { macMaxFrameRetries: 0 }).phy // 'oqpsk-2450'
 */
export function linkOf(nodeLink: LinkSettings = {}, stepLink?: LinkSettings): LinkSettings {
  if (stepLink === undefined) return nodeLink;
  const merged: LinkSettings = { ...nodeLink, ...stepLink };
  if (nodeLink.frame && stepLink.frame) merged.frame = { ...nodeLink.frame, ...stepLink.frame };
  if (nodeLink.phyConstants && stepLink.phyConstants) {
    merged.phyConstants = { ...nodeLink.phyConstants, ...stepLink.phyConstants };
  }
  if (nodeLink.crystal && stepLink.crystal) merged.crystal = { ...nodeLink.crystal, ...stepLink.crystal };
  return merged;
}
