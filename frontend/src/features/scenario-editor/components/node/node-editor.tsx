import { memo } from 'react';
import type { InputProblem } from '#common/schemas/problem.ts';
import { LeakagesGrid } from './leakages-grid.tsx';
import { LinkSection } from './link-section.tsx';
import { MaximaSection } from './maxima-section.tsx';
import { PartsSection } from './parts-section.tsx';
import { RoutinesSection } from './routines-section.tsx';
import { Section } from './section.tsx';

/** Everything about the node that can be edited, from what it does to what it is made of. */
export const NodeEditor = memo(function NodeEditor({ problems }: { problems: readonly InputProblem[] }) {
  return (
    <>
      <RoutinesSection problems={problems} />
      <LinkSection />
      <PartsSection />
      <Section id="leakages" title="Leakages" note="currents that always flow: a divider, a supervisor, the board">
        <LeakagesGrid />
      </Section>
      <MaximaSection />
    </>
  );
});
