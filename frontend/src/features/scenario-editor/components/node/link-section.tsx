import { useMemo, useState } from 'react';
import { CautionProvider } from '#frontend/features/scenario-editor/hooks/caution-context.tsx';
import { useDocument, useEditorStore, useProblems } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import {
  exchangeCount,
  linkWords,
  nodeLinkCautions,
  overridesOf,
  withNodeLink,
  type Override,
} from '#frontend/features/scenario-editor/model/link/node-link.ts';
import { LinkFields } from '../link/link-fields.tsx';
import { Section } from './section.tsx';

/** The link settings of the node, which its steps on the air follow unless they say otherwise. */
export function LinkSection() {
  const link = useDocument((document) => document.node.link);
  const routines = useDocument((document) => document.node.routines);
  const cautions = useMemo(() => nodeLinkCautions({ routines, ...(link && { link }) }), [routines, link]);
  const overrides = useMemo(() => overridesOf({ routines }), [routines]);
  const count = useMemo(() => exchangeCount({ routines }), [routines]);
  const isWrong = [...useProblems().keys()].some((field) => field.startsWith('node.link'));
  const [isOpen, setOpen] = useState(false);
  return (
    <Section id="link" title="Link" note={noteOf(count)}>
      <details open={isOpen} onToggle={(event) => setOpen(event.currentTarget.open)}>
        <summary className="flex min-h-10 list-none flex-wrap items-baseline gap-x-3 border-b border-hair py-2 hover:text-accent [&::-webkit-details-marker]:hidden">
          <span className="shrink-0 font-semibold">
            <span aria-hidden="true" className="mr-1.5 inline-block w-3 text-muted">
              {isOpen ? '−' : '+'}
            </span>
            Settings of the node
          </span>
          <span className="min-w-0 flex-1 text-small text-muted max-sm:basis-full max-sm:pl-[1.125rem]">
            {linkWords(link ?? {})}
            {isWrong && <strong className="ml-2 font-semibold text-rust">something is wrong</strong>}
            {!isWrong && cautions.size > 0 && (
              <strong className="ml-2 font-semibold text-caution">
                {cautions.size === 1 ? 'one figure is assumed' : `${cautions.size} figures are assumed`}
              </strong>
            )}
          </span>
        </summary>
        {isOpen && (
          <div className="pl-[1.125rem] max-sm:pl-0">
            <CautionProvider cautions={cautions}>
              <LinkFields path="node.link" of="the node" settings={link ?? {}} inherited={null} change={withNodeLink} />
            </CautionProvider>
          </div>
        )}
      </details>
      {overrides.length > 0 && <Overrides overrides={overrides} />}
    </Section>
  );
}

function noteOf(count: number): string {
  if (count === 0) return 'how the radio reaches others; no step takes its time from it yet';
  return `how the radio reaches others; ${count} ${count === 1 ? 'step takes its time' : 'steps take their times'} from it`;
}

function Overrides({ overrides }: { overrides: readonly Override[] }) {
  const store = useEditorStore();
  return (
    <div className="mt-2 text-small">
      <p className="text-muted">Steps with settings of their own:</p>
      <ul className="mt-1">
        {overrides.map(({ routineId, routineName, stepId, stepName, sections }) => (
          <li key={`${routineId} ${stepId}`} className="min-h-8">
            <button type="button" className="link" onClick={() => store.select({ routineId, stepId })}>
              {stepName}
            </button>
            <span className="text-muted">
              {' '}
              in {routineName}: {sections.join(', ')}
            </span>
          </li>
        ))}
      </ul>
    </div>
  );
}
