import { Menu } from '#frontend/components/menu.tsx';
import { useIsReadOnly } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';

interface ItemActionsProps {
  name: string;
  what: string;
  onMove: (places: number) => void;
  onDuplicate: () => void;
  onRemove: () => void;
  extra?: readonly { key: string; label: string; onSelect: () => void }[];
}

/** What can be done with the chosen part or routine as a whole. */
export function ItemActions({ name, what, onMove, onDuplicate, onRemove, extra = [] }: ItemActionsProps) {
  if (useIsReadOnly()) return null;
  return (
    <div className="pt-5">
      <Menu
        label={`Actions on ${name}`}
        button={<span aria-hidden="true">⋯</span>}
        buttonClassName="inline-flex size-9 items-center justify-center rounded-full border border-line text-lg hover:bg-accent-soft"
        items={[
          { key: 'duplicate', label: `Duplicate this ${what}`, onSelect: onDuplicate },
          { key: 'before', label: 'Move one place forward', onSelect: () => onMove(-1) },
          { key: 'after', label: 'Move one place back', onSelect: () => onMove(1) },
          ...extra,
          { key: 'remove', label: `Remove this ${what}`, onSelect: onRemove, isDanger: true, startsGroup: true },
        ]}
      />
    </div>
  );
}
