import { useState } from 'react';
import type { InputProblem } from '#common/schemas/problem.ts';
import { Button } from '#frontend/components/button.tsx';
import { QuantityInput } from '#frontend/components/quantity-input.tsx';
import {
  useDocument,
  useEditorStore,
  useIsReadOnly,
} from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { CURRENT, STEP_TIME } from '#frontend/features/scenario-editor/model/figure-options.ts';
import {
  missingMoves,
  type MissingLink,
  type MissingMove,
} from '#frontend/features/scenario-editor/model/missing-moves.ts';
import { addTransition } from '#frontend/features/scenario-editor/model/operations/part-operations.ts';
import { useEditorState } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';

/** Moves that a routine asks for and its parts cannot make, each with the transition that would make it possible. */
export function MissingMoves({ problems }: { problems: readonly InputProblem[] }) {
  const document = useEditorState((state) => state.document);
  const moves = missingMoves(document, problems);
  if (moves.length === 0) return null;
  return (
    <div role="status" className="mt-4 space-y-5">
      {moves.map((move) => (
        <MissingMoveOffer key={move.key} move={move} />
      ))}
    </div>
  );
}

function MissingMoveOffer({ move }: { move: MissingMove }) {
  const { part, from, to, step, routine, reachable } = move;
  const nameOf = (stateId: string): string => part.states.find(({ id }) => id === stateId)?.name ?? stateId;
  return (
    <section aria-label={`Missing transition of ${part.name}`} className="border-l-2 border-rust pl-5">
      <p>
        <strong className="font-extrabold">
          {part.name} cannot go from {from.name} to {to.name}
        </strong>
        , which step “{step.name}” of “{routine.name}” asks for.
      </p>
      <p className="text-small text-muted">
        {reachable.length === 0
          ? `From ${from.name} no state can be reached.`
          : `From ${from.name} it can reach ${reachable.map(({ name }) => name).join(', ')}.`}
      </p>
      <AddLink move={move} nameOf={nameOf} />
    </section>
  );
}

function AddLink({ move, nameOf }: { move: MissingMove; nameOf: (stateId: string) => string }) {
  const store = useEditorStore();
  const isReadOnly = useIsReadOnly();
  const referenceV = useDocument((document) => document.supply.regulator);
  const [durationS, setDurationS] = useState<number | undefined>(0);
  const [currentA, setCurrentA] = useState<number | undefined>(0);
  if (isReadOnly) return null;
  const words = (link: MissingLink): string =>
    link.viaStateId === null
      ? `Add ${nameOf(link.fromStateId)} to ${nameOf(link.toStateId)}`
      : `Go through ${nameOf(link.viaStateId)}: add ${nameOf(link.fromStateId)} to ${nameOf(link.toStateId)}`;
  const add = (link: MissingLink): void =>
    store.edit({
      label: `add the transition ${nameOf(link.fromStateId)} to ${nameOf(link.toStateId)}`,
      change: (document) =>
        addTransition(document, move.part.id, {
          fromStateId: link.fromStateId,
          toStateId: link.toStateId,
          durationS: { typical: durationS ?? 0, provenance: { kind: 'assumed' } },
          current: { typical: currentA ?? 0, provenance: { kind: 'assumed' } },
        }),
    });
  return (
    <div className="mt-1 flex flex-wrap items-end gap-x-6">
      <div className="w-28">
        <QuantityInput label="It takes" value={durationS} options={STEP_TIME} hint="assumed" onCommit={setDurationS} />
      </div>
      <div className="w-28">
        <QuantityInput
          label="at"
          value={currentA}
          options={CURRENT}
          hint={referenceV.kind === 'none' ? 'assumed' : 'assumed, at the rail'}
          onCommit={setCurrentA}
        />
      </div>
      <div className="flex flex-wrap gap-2 pb-5">
        {move.links.map((link, index) => (
          <Button
            key={`${link.fromStateId} ${link.toStateId}`}
            variant={index === 0 ? 'primary' : 'quiet'}
            onClick={() => add(link)}
          >
            {words(link)}
          </Button>
        ))}
      </div>
    </div>
  );
}
