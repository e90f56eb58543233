import { describe, expect, it } from 'vitest';
import { scenarioTemplate } from '#common/catalogue/templates.ts';
import type { LinkSettings, Node } from '#common/engine/scenario/scenario.types.ts';
import { linkWords, nodeLinkCautions, overridesOf, withNodeLink } from './node-link.ts';

const { document } = scenarioTemplate('acknowledged-report');

function withStepLink(link: LinkSettings): Node {
  const { node } = document;
  return {
    ...node,
    routines: node.routines.map((routine) => ({
      ...routine,
      steps: routine.steps.map((step) =>
        step.duration.kind === 'exchange' ? { ...step, duration: { ...step.duration, link } } : step,
      ),
    })),
  };
}

describe('overridesOf', () => {
  it('is empty where all steps follow the node', () => {
    expect(overridesOf(document.node)).toEqual([]);
  });

  it('names the step and the sections in which it differs', () => {
    const node = withStepLink({ phy: 'bpsk-868', busyProbability: { typical: 0.5 }, frame: { securityLevel: 5 } });
    expect(overridesOf(node)).toEqual([
      {
        routineId: 'report',
        routineName: 'Measure and report',
        stepId: 'send',
        stepName: 'Send the report',
        sections: ['PHY', 'Frame format', 'Channel'],
      },
    ]);
  });
});

describe('withNodeLink', () => {
  it('takes empty settings away', () => {
    expect(withNodeLink(document, () => ({})).node.link).toBeUndefined();
  });

  it('changes one setting and keeps the others', () => {
    const { link } = withNodeLink(document, (before) => ({ ...before, macMaxFrameRetries: 0 })).node;
    expect([link?.macMaxFrameRetries, link?.phy]).toEqual([0, 'oqpsk-2450']);
  });

  it('gives the same document when nothing changes', () => {
    expect(withNodeLink(document, (link) => link)).toBe(document);
  });
});

describe('linkWords', () => {
  it('tells PHY, busy channel, loss and retries in one line', () => {
    const words = linkWords(document.node.link ?? {}).replaceAll('\u00a0', ' ');
    expect(words).toBe('2450 MHz O-QPSK, 250 kbit/s · busy 10 % · lost 5 % · 3 retries');
  });
});

describe('nodeLinkCautions', () => {
  it('is empty where the node gives all that its steps need', () => {
    expect([...nodeLinkCautions(document.node)]).toEqual([]);
  });

  it('says what a step has to assume', () => {
    const cautions = nodeLinkCautions({ ...document.node, link: { phy: 'oqpsk-2450' } });
    expect([...cautions.keys()]).toEqual([
      'node.link.busyProbability',
      'node.link.frameErrorRate',
      'node.link.ackErrorRate',
    ]);
  });

  it('leaves out what the step gives itself', () => {
    const node = withStepLink({ busyProbability: { typical: 0.5 } });
    const cautions = nodeLinkCautions({ ...node, link: { phy: 'oqpsk-2450' } });
    expect(cautions.has('node.link.busyProbability')).toBe(false);
  });

  it('keeps silent where the settings give no plan', () => {
    expect([...nodeLinkCautions({ ...document.node, link: {} })]).toEqual([]);
  });
});
