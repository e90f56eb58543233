import { useState } from 'react';
import type { LibraryItem } from '#common/schemas/api/library.ts';
import { formatChargeMah } from '#common/units/format-quantity.ts';
import { Button } from '#frontend/components/button.tsx';
import { Dialog } from '#frontend/components/dialog.tsx';
import {
  useDocument,
  useEditorStore,
  useIsReadOnly,
} from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { updateSupply } from '#frontend/features/scenario-editor/model/operations/supply-operations.ts';
import { LibraryPicker } from '../library-picker.tsx';
import { Section } from '../node/section.tsx';
import { CellFigures } from './cell-figures.tsx';
import { CellTables } from './cell-tables.tsx';
import { ResistanceTable } from './resistance-table.tsx';

/** The cell: one from the library to begin with, every figure of it open to change. */
export function CellSection() {
  const cell = useDocument(({ supply }) => supply.cell);
  const [isPicking, setPicking] = useState(false);
  const isReadOnly = useIsReadOnly();
  return (
    <Section id="cell" title="Cell" note={[cell.designation, cell.chemistry].filter(Boolean).join(', ')}>
      {!isReadOnly && (
        <Button className="mb-3" onClick={() => setPicking(true)}>
          Take another cell
        </Button>
      )}
      <CellFigures cell={cell} />
      <ResistanceTable rows={cell.resistanceOhm} />
      <CellTables cell={cell} />
      <Dialog title="Take a cell" isOpen={isPicking} onClose={() => setPicking(false)}>
        <CellPicker onClose={() => setPicking(false)} />
      </Dialog>
    </Section>
  );
}

function CellPicker({ onClose }: { onClose: () => void }) {
  const store = useEditorStore();
  return (
    <LibraryPicker
      kind="cell"
      label="Find a cell by designation"
      describe={describeCell}
      onPick={({ content }) => {
        if (content.kind !== 'cell') return;
        store.edit({
          label: `take the cell ${content.cell.designation}`,
          change: (document) => updateSupply(document, (supply) => ({ ...supply, cell: content.cell })),
        });
        onClose();
      }}
    />
  );
}

function describeCell({ content }: LibraryItem): string {
  if (content.kind !== 'cell') return '';
  const { chemistry, capacityC } = content.cell;
  return [chemistry, formatChargeMah(capacityC.typical)].filter(Boolean).join(', ');
}
