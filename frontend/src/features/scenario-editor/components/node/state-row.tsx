import { memo } from 'react';
import type { State } from '#common/engine/scenario/scenario.types.ts';
import { CURRENT } from '#frontend/features/scenario-editor/model/figure-options.ts';
import { renameState, updateState } from '#frontend/features/scenario-editor/model/operations/part-operations.ts';
import { withOptional } from '#frontend/features/scenario-editor/model/operations/supply-operations.ts';
import { ROLES } from '#frontend/features/scenario-editor/model/words.ts';
import { TextFieldOf } from '../fields/bound-fields.tsx';
import { ChoiceField } from '../fields/choice-field.tsx';
import { QuantityCells } from '../fields/quantity-fields.tsx';
import { GridCell, GridNameCell, GridRow } from '../grid/edit-grid.tsx';

interface StateRowProps {
  partId: string;
  partName: string;
  state: State;
  isSelected: boolean;
}

/** A state of a part as a row: name, role, current. */
export const StateRow = memo(function StateRow({ partId, partName, state, isSelected }: StateRowProps) {
  const field = `node.parts.${partId}.states.${state.id}`;
  const label = `${partName}, ${state.name}`;
  return (
    <GridRow rowId={state.id} isSelected={isSelected}>
      <GridNameCell>
        <TextFieldOf
          field={`${field}.name`}
          label="Name of the state"
          value={state.name}
          isCell
          change={(document, name) => updateState(document, partId, state.id, (before) => renameState(before, name))}
        />
      </GridNameCell>
      <GridCell column="role">
        <ChoiceField
          field={`${field}.role`}
          label={`Role of ${state.name}`}
          isCell
          value={state.role ?? ''}
          choices={[{ value: '', label: 'none' }, ...ROLES]}
          change={(document, role) =>
            updateState(document, partId, state.id, (before) =>
              withOptional(before, 'role', role === '' ? undefined : role),
            )
          }
        />
      </GridCell>
      <QuantityCells
        field={`${field}.current`}
        label={`${label}: current`}
        quantity={state.current}
        options={CURRENT}
        change={(document, update) =>
          updateState(document, partId, state.id, (before) => ({ ...before, current: update(before.current) }))
        }
      />
    </GridRow>
  );
});
