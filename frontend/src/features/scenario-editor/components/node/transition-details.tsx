import type { Part, Transition } from '#common/engine/scenario/scenario.types.ts';
import { useDocument } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { workingState } from '#frontend/features/scenario-editor/model/operations/exchange-operations.ts';
import { updateTransition } from '#frontend/features/scenario-editor/model/operations/part-operations.ts';
import { withOptional } from '#frontend/features/scenario-editor/model/operations/supply-operations.ts';
import { ChoiceField } from '../fields/choice-field.tsx';

interface Props {
  part: Part;
  index: number;
  transition: Transition;
  /** From which state to which, in words. */
  name: string;
}

/** What else happens while a part is on its way: another part may have to ask whether it has arrived. */
export function TransitionDetails({ part, index, transition, name }: Props) {
  const parts = useDocument((document) => document.node.parts);
  const others = parts.filter(({ id }) => id !== part.id);
  const { busy } = transition;
  const states = others.find(({ id }) => id === busy?.partId)?.states ?? [];
  const field = `node.parts.${part.id}.transitions.${index}.busy`;
  if (others.length === 0) return null;
  return (
    <fieldset className="mt-3 border-l-2 border-hair pl-5">
      <legend className="sr-only">Details of {name}</legend>
      <p aria-hidden="true" className="text-small text-muted">
        <strong className="font-extrabold text-ink">{name}</strong> in detail
      </p>
      <div className="mt-1 grid grid-cols-2 gap-x-6 sm:grid-cols-3">
        <ChoiceField
          field={field}
          label="Keeps busy"
          hint="a part that polls a status register meanwhile"
          editLabel={`part kept busy by ${name}`}
          value={busy?.partId ?? ''}
          choices={[
            { value: '', label: 'no other part' },
            ...others.map((other) => ({ value: other.id, label: other.name })),
          ]}
          change={(document, partId) =>
            updateTransition(document, part.id, index, (before) => {
              const other = document.node.parts.find(({ id }) => id === partId);
              const state = other && workingState(other);
              return withOptional(before, 'busy', state && { partId, stateId: state.id });
            })
          }
        />
        {busy && (
          <ChoiceField
            field={`${field}.stateId`}
            label="in the state"
            editLabel={`state of the part kept busy by ${name}`}
            value={busy.stateId}
            choices={states.map((state) => ({ value: state.id, label: state.name }))}
            change={(document, stateId) =>
              updateTransition(document, part.id, index, (before) =>
                before.busy ? { ...before, busy: { ...before.busy, stateId } } : before,
              )
            }
          />
        )}
      </div>
    </fieldset>
  );
}
