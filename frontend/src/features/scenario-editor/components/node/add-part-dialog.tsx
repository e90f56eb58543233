import type { Part, PartKind } from '#common/engine/scenario/scenario.types.ts';
import type { LibraryItem } from '#common/schemas/api/library.ts';
import { Button } from '#frontend/components/button.tsx';
import { Dialog } from '#frontend/components/dialog.tsx';
import { useEditorStore } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import {
  addPart,
  emptyPart,
  idOfNewPart,
} from '#frontend/features/scenario-editor/model/operations/part-operations.ts';
import { PART_KINDS } from '#frontend/features/scenario-editor/model/words.ts';
import { LibraryPicker } from '../library-picker.tsx';

/** Adds a part: a copy of one in the library or the catalogue, or an empty one of a kind. */
export function AddPartDialog({ isOpen, onClose }: { isOpen: boolean; onClose: () => void }) {
  const store = useEditorStore();
  const add = (part: Part): void => {
    const partId = idOfNewPart(store.getState().document.node, part.name);
    onClose();
    store.edit({
      label: `add the part “${part.name}”`,
      selection: { partId },
      focus: `node.parts.${partId}.name`,
      change: (document) => addPart(document, part),
    });
  };
  return (
    <Dialog title="Add a part" isOpen={isOpen} onClose={onClose}>
      <LibraryPicker
        kind="part"
        label="Find a part by name"
        describe={describePart}
        onPick={({ content }) => content.kind === 'part' && add(content.part)}
      />
      <p className="mt-5 text-small text-muted">Or begin with an empty one, and type its currents:</p>
      <div className="mt-2 flex flex-wrap gap-2">
        {PART_KINDS.map(({ value, label }) => (
          <Button key={value} onClick={() => add(emptyPart(value, nameOfKind(value)))}>
            {label}
          </Button>
        ))}
      </div>
    </Dialog>
  );
}

function describePart({ content }: LibraryItem): string {
  if (content.kind !== 'part') return '';
  const { kind, states } = content.part;
  return `${kind}, ${states.length} state${states.length === 1 ? '' : 's'}`;
}

const nameOfKind = (kind: PartKind): string => (kind === 'other' ? 'Part' : kind.replace(/^./, (c) => c.toUpperCase()));
