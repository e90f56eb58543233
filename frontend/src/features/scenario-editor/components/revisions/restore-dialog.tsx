import { useMutation, useQueryClient } from '@tanstack/react-query';
import type { RevisionSummary } from '#common/schemas/api/scenarios.ts';
import { ConfirmDialog } from '#frontend/components/confirm-dialog.tsx';
import { FormError } from '#frontend/components/states.tsx';
import { useToast } from '#frontend/components/toast.tsx';
import { wordsOfError } from '#frontend/lib/form-errors.ts';
import { restoreRevision, REVISIONS_KEY } from '#frontend/features/scenario-editor/api/revisions.ts';
import { useEditorState, useEditorStore } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { isDirty } from '#frontend/features/scenario-editor/model/editor-state.ts';
import { savedOf } from '#frontend/features/scenario-editor/model/opening.ts';

interface RestoreDialogProps {
  scenarioId: string;
  revision: RevisionSummary;
  onClose: () => void;
}

/** Asks, then makes a new revision of an earlier document. What was unsaved stays in undo. */
export function RestoreDialog({ scenarioId, revision, onClose }: RestoreDialogProps) {
  const store = useEditorStore();
  const client = useQueryClient();
  const toast = useToast();
  const isChanged = useEditorState(isDirty);
  const restore = useMutation({
    mutationFn: () => restoreRevision(scenarioId, revision.revision, store.getState().saved.version),
    onSuccess: (detail) => {
      store.rebase(savedOf(detail));
      store.replaceDocument(detail.document, `restore revision ${revision.revision}`);
      void client.invalidateQueries({ queryKey: [REVISIONS_KEY, scenarioId, 'list'] });
      toast({ text: `Revision ${detail.revision} now has the document of revision ${revision.revision}.` });
      onClose();
    },
  });
  return (
    <ConfirmDialog
      title={`Restore revision ${revision.revision}?`}
      action="Restore"
      isOpen
      isBusy={restore.isPending}
      onClose={onClose}
      onConfirm={() => restore.mutate()}
    >
      {restore.isError && <FormError>{wordsOfError(restore.error)}</FormError>}
      <p>
        This saves a new revision with the document of revision {revision.revision}. The revisions in between stay in
        the list.
      </p>
      {isChanged && <p className="mt-2">Your unsaved changes leave the page; undo brings them back.</p>}
    </ConfirmDialog>
  );
}
