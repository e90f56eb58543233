import { Button } from '#frontend/components/button.tsx';
import { Dialog, DialogActions } from '#frontend/components/dialog.tsx';
import { useEditorStore } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import type { PasteRow } from '#frontend/features/scenario-editor/model/paste/paste.ts';
import type { PasteTarget } from '#frontend/features/scenario-editor/model/paste/steps-paste.ts';
import type { PastedBlock } from '../grid/edit-grid.tsx';

interface PasteDialogProps {
  block: PastedBlock;
  target: PasteTarget;
  onClose: () => void;
}

/** What a pasted table will do before it does it: each cell, and what is wrong with those that cannot be taken. */
export function PasteDialog({ block, target, onClose }: PasteDialogProps) {
  const store = useEditorStore();
  const preview = target(store.getState().document, block);
  if (!preview) return null;
  const problems = preview.rows.flatMap((row) => row.cells).filter(({ problem }) => problem !== null).length;
  const cells = preview.rows.flatMap((row) => row.cells).filter(({ text }) => text !== '').length;
  const good = cells - problems;
  const added = preview.rows.filter(({ into }) => into === null).length;
  const take = (): void => {
    store.edit({ label: 'paste a table', change: preview.apply });
    onClose();
  };
  return (
    <Dialog title="Paste a table" isOpen isWide onClose={onClose}>
      <p className="text-muted">
        {preview.rows.length} row{preview.rows.length === 1 ? '' : 's'}, {added} of them new.{' '}
        {problems === 0
          ? 'Every cell can be taken.'
          : `${problems} cell${problems === 1 ? '' : 's'} cannot be taken as written; what is there now stays.`}
        {preview.dropped > 0 && ` ${preview.dropped} rows are left out: there is no room for more.`}
      </p>
      <div role="region" aria-label="Preview" tabIndex={0} className="mt-4 max-h-80 overflow-auto">
        <table className="w-full border-collapse text-left text-small">
          <thead>
            <tr className="border-b border-line">
              <th scope="col" className="py-1 pr-3 font-normal text-muted">
                Goes into
              </th>
              {preview.headers.map((header, at) => (
                <th key={`${header} ${at}`} scope="col" className="px-2 py-1 font-normal text-muted">
                  {header === '' ? 'no column' : header}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {preview.rows.map((row, index) => (
              <PreviewRow key={`${index} ${row.into}`} row={row} />
            ))}
          </tbody>
        </table>
      </div>
      <DialogActions>
        <Button onClick={onClose}>Cancel</Button>
        <Button variant="primary" disabled={good === 0} onClick={take}>
          {problems === 0 ? 'Paste' : `Paste the ${good} that can be taken`}
        </Button>
      </DialogActions>
    </Dialog>
  );
}

function PreviewRow({ row }: { row: PasteRow }) {
  return (
    <tr className="border-b border-hair align-baseline">
      <th scope="row" className="py-1.5 pr-3 font-normal text-muted">
        {row.into ?? 'new row'}
      </th>
      {row.cells.map((cell, at) => (
        <td key={at} className="px-2 py-1.5">
          <span className={cell.problem === null ? '' : 'text-rust line-through'}>{cell.text}</span>
          {cell.problem !== null && <span className="block max-w-56 text-rust">{cell.problem}</span>}
        </td>
      ))}
    </tr>
  );
}
