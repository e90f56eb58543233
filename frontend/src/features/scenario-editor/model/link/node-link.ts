import { exchangePlan } from '#common/engine/link/exchange-plan.ts';
import { linkOf } from '#common/engine/link/link-of.ts';
import type { LinkSettings, Node, Scenario } from '#common/engine/scenario/scenario.types.ts';
import { EngineError } from '#common/errors.ts';
import { updateNode } from '../operations/part-operations.ts';
import { withOptional } from '../operations/supply-operations.ts';
import { LINK_SECTIONS, type LinkSectionId } from './link-fields.table.ts';
import { valueAt } from './link-values.ts';

/** The document with other link settings of the node; empty ones are none. */
export function withNodeLink(document: Scenario, apply: (link: LinkSettings) => LinkSettings): Scenario {
  return updateNode(document, (node) => {
    const link = apply(node.link ?? {});
    return link === node.link ? node : withOptional(node, 'link', Object.keys(link).length === 0 ? undefined : link);
  });
}

/** How much of each section the line has room for: its first so many words, and the last of the standard's counts. */
const TOLD: readonly { id: LinkSectionId; from: number; to: number }[] = [
  { id: 'phy', from: 0, to: 1 },
  { id: 'channel', from: 0, to: 2 },
  { id: 'access', from: 2, to: 3 },
];

/** The settings in one line: PHY, busy channel, loss, retries. */
export function linkWords(link: LinkSettings): string {
  return TOLD.flatMap(({ id, from, to }) =>
    LINK_SECTIONS.filter((section) => section.id === id).flatMap(({ summary }) => summary(link).slice(from, to)),
  )
    .filter((words) => words !== undefined)
    .join(' · ');
}

/** A step with link settings of its own, and the sections in which they stand. */
export interface Override {
  routineId: string;
  routineName: string;
  stepId: string;
  stepName: string;
  sections: string[];
}

/** The steps that do not follow the node in everything. */
export function overridesOf({ routines }: Pick<Node, 'routines'>): Override[] {
  return routines.flatMap(({ id: routineId, name: routineName, steps }) =>
    steps.flatMap(({ id: stepId, name: stepName, duration }): Override[] => {
      if (duration.kind !== 'exchange' || duration.link === undefined) return [];
      const { link } = duration;
      const isSet = (key: string): boolean => valueAt(link, key) !== undefined;
      const sections = LINK_SECTIONS.filter(({ id, fields }) => isSet(id) || fields.some(({ key }) => isSet(key))).map(
        ({ title }) => title,
      );
      return sections.length === 0 ? [] : [{ routineId, routineName, stepId, stepName, sections }];
    }),
  );
}

/** How many steps take their times from the link. */
export function exchangeCount({ routines }: Pick<Node, 'routines'>): number {
  return routines.flatMap(({ steps }) => steps).filter(({ duration }) => duration.kind === 'exchange').length;
}

/** What must be said of the node's own settings, by field: of figures that a step has to assume, for example. */
export function nodeLinkCautions({ routines, link: nodeLink }: Pick<Node, 'routines' | 'link'>): Map<string, string> {
  const cautions = new Map<string, string>();
  for (const { duration } of routines.flatMap(({ steps }) => steps)) {
    if (duration.kind !== 'exchange') continue;
    try {
      for (const { field, message } of exchangePlan(duration, linkOf(nodeLink, duration.link)).cautions) {
        const isOwn = valueAt({ link: duration.link }, field) !== undefined;
        if (field.startsWith('link.') && !isOwn) cautions.set(`node.${field}`, message);
      }
    } catch (error) {
      // The forecast tells of settings that give no plan.
      if (!(error instanceof EngineError)) throw error;
    }
  }
  return cautions;
}
