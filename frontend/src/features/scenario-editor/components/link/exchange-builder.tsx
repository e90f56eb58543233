import { useDeferredValue, useMemo, useState } from 'react';
import type { ExchangePlan } from '#common/engine/link/exchange-plan.types.ts';
import { CautionProvider } from '#frontend/features/scenario-editor/hooks/caution-context.tsx';
import { useDocument, useFieldProblem } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { EXCHANGES } from '#frontend/features/scenario-editor/model/link/exchange-fields.table.ts';
import { planOf, type PlanResult } from '#frontend/features/scenario-editor/model/link/plan-of.ts';
import { withLink } from '#frontend/features/scenario-editor/model/operations/exchange-operations.ts';
import { WhatIf } from '../what-if/what-if.tsx';
import { ExchangeFields } from './exchange-fields.tsx';
import { ExchangePicture } from './exchange-picture.tsx';
import { FrameOctets } from './frame-octets.tsx';
import { LinkFields } from './link-fields.tsx';
import { LoadingFields, type ExchangeFieldsProps } from './loading-fields.tsx';
import { PlanFigures } from './plan-figures.tsx';

interface Props extends ExchangeFieldsProps {
  routineId: string;
  stepId: string;
}

/** A step derived from the link: what is sent and how, and what the radio then does for how long. */
export function ExchangeBuilder({ routineId, stepId, ...props }: Props) {
  const { field, stepName, exchange, change } = props;
  const nodeLink = useDocument((document) => document.node.link);
  const result = useMemo(() => planOf(exchange, nodeLink), [exchange, nodeLink]);
  const shown = useLastPlan(result);
  const cautions = useMemo(() => cautionsByField(field, result), [field, result]);
  return (
    <CautionProvider cautions={cautions}>
      <ExchangeFields {...props} />
      <div className="col-span-full mt-1">
        <LinkFields
          path={`${field}.link`}
          of={stepName}
          settings={exchange.link ?? {}}
          inherited={nodeLink ?? {}}
          sections={EXCHANGES[exchange.pattern].link}
          change={(document, apply) => change(document, (before) => withLink(before, apply))}
        />
        <LoadingFields {...props} />
        <Outcome field={field} result={result} />
        {shown && <Pictures plan={shown} isOld={result.kind === 'problem'} />}
        <WhatIf routineId={routineId} stepId={stepId} />
      </div>
    </CautionProvider>
  );
}

/** The last plan that the inputs gave: while one types something impossible the pictures stay, greyed. */
function useLastPlan(result: PlanResult): ExchangePlan | null {
  const plan = result.kind === 'plan' ? result.plan : null;
  const [last, setLast] = useState(plan);
  if (plan !== null && plan !== last) setLast(plan);
  return plan ?? last;
}

function cautionsByField(field: string, result: PlanResult): ReadonlyMap<string, string> {
  if (result.kind === 'problem') return new Map();
  const cautions = new Map<string, string>();
  for (const { field: relative, message } of result.plan.cautions) {
    const key = relative === '' ? field : `${field}.${relative}`;
    const before = cautions.get(key);
    cautions.set(key, before === undefined ? message : `${before} ${message}`);
  }
  return cautions;
}

function Outcome({ field, result }: { field: string; result: PlanResult }) {
  const problem = useFieldProblem(field);
  if (result.kind === 'problem') {
    return (
      <p role="status" className="mt-3 border-l-2 border-rust pl-4 text-rust">
        {result.message}
      </p>
    );
  }
  const general = result.plan.cautions.filter(({ field: relative }) => relative === '');
  return (
    <>
      {problem !== undefined && <p className="mt-3 border-l-2 border-rust pl-4 text-rust">{problem}</p>}
      {general.map(({ code, message }) => (
        <p key={`${code} ${message}`} className="mt-3 border-l-2 border-caution pl-4 text-small">
          {message}
        </p>
      ))}
    </>
  );
}

function Pictures({ plan, isOld }: { plan: ExchangePlan; isOld: boolean }) {
  // The field being typed into comes first, the drawing a moment later.
  const drawn = useDeferredValue(plan);
  return (
    <div className={isOld ? 'opacity-50' : ''} aria-busy={isOld}>
      {drawn.frame && <FrameOctets frame={drawn.frame} />}
      <ExchangePicture plan={drawn} />
      <PlanFigures figures={drawn.figures} />
    </div>
  );
}
