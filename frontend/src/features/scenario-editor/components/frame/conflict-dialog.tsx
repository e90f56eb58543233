import { useMemo } from 'react';
import { diffDocuments } from '#common/schemas/document-diff.ts';
import type { ScenarioDetail } from '#common/schemas/api/scenarios.ts';
import { Button } from '#frontend/components/button.tsx';
import { Dialog, DialogActions } from '#frontend/components/dialog.tsx';
import { dateAndTime } from '#frontend/lib/dates.ts';
import { useEditorState } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import type { Saving } from '#frontend/features/scenario-editor/hooks/use-save.ts';
import { ChangeList } from '../revisions/change-list.tsx';

/** Someone saved in between: shows both sides and lets the person choose. Neither choice loses anything. */
export function ConflictDialog({ saving, theirs }: { saving: Saving; theirs: ScenarioDetail }) {
  const base = useEditorState((state) => state.saved);
  const mine = useEditorState((state) => state.document);
  const theirChanges = useMemo(() => diffDocuments(base.document, theirs.document), [base, theirs]);
  const myChanges = useMemo(() => diffDocuments(base.document, mine), [base, mine]);
  const theirPaths = new Set(theirChanges.map(({ path }) => path));
  const contested = new Set(myChanges.map(({ path }) => path).filter((path) => theirPaths.has(path)));
  return (
    <Dialog
      title={`${theirs.updatedBy} saved revision ${theirs.revision} meanwhile`}
      isOpen
      isWide
      onClose={saving.dismiss}
    >
      <p className="text-muted">
        You began on revision {base.revision}; revision {theirs.revision} was saved {dateAndTime(theirs.updatedAt)}. It
        stays in the list of revisions whatever you choose, and what you changed stays within reach of undo.
      </p>
      <div className="mt-5 grid gap-x-10 gap-y-6 md:grid-cols-2">
        <section aria-labelledby="their-changes" className="min-w-0">
          <h3 id="their-changes" className="font-extrabold">
            What {theirs.updatedBy} changed
          </h3>
          <div className="max-h-72 overflow-y-auto" tabIndex={0} role="region" aria-labelledby="their-changes">
            <ChangeList label="Their changes" changes={theirChanges} contested={contested} />
          </div>
        </section>
        <section aria-labelledby="my-changes" className="min-w-0">
          <h3 id="my-changes" className="font-extrabold">
            What you changed
          </h3>
          <div className="max-h-72 overflow-y-auto" tabIndex={0} role="region" aria-labelledby="my-changes">
            <ChangeList label="Your changes" changes={myChanges} contested={contested} />
          </div>
        </section>
      </div>
      <DialogActions>
        <Button onClick={saving.dismiss}>Keep editing</Button>
        <Button onClick={saving.takeTheirs}>Take revision {theirs.revision} (mine stays in undo)</Button>
        <Button variant="primary" onClick={saving.keepMine}>
          Keep mine as a new revision on top
        </Button>
      </DialogActions>
    </Dialog>
  );
}
