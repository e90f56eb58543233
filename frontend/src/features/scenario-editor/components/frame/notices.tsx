import { TextButton } from '#frontend/components/button.tsx';
import { dateAndTime } from '#frontend/lib/dates.ts';
import { useEditorStore } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import type { Saving } from '#frontend/features/scenario-editor/hooks/use-save.ts';
import { fieldOfPath } from '#frontend/features/scenario-editor/model/fields.ts';
import type { KeptWork } from '#frontend/features/scenario-editor/model/opening.ts';

interface KeptWorkNoticeProps {
  kept: KeptWork;
  onKeep: () => void;
  onDiscard: () => void;
}

/** Work that an earlier visit left unsaved: it is here again, and can be let go. */
export function KeptWorkNotice({ kept, onKeep, onDiscard }: KeptWorkNoticeProps) {
  return (
    <div role="status" className="mt-5 border-l-2 border-caution pl-5">
      <p>
        <strong className="font-extrabold">Unsaved changes from {dateAndTime(kept.writtenAt)}</strong> are back on the
        page.
      </p>
      {kept.newer && (
        <p className="text-muted">
          They were made on revision {kept.baseRevision}. Meanwhile {kept.newer.savedBy} has saved revision{' '}
          {kept.newer.revision}; saving shows both before anything is replaced.
        </p>
      )}
      <p className="mt-1 flex gap-6">
        <TextButton onClick={onKeep}>Keep editing</TextButton>
        <TextButton onClick={onDiscard}>
          {kept.newer ? `Discard them and take revision ${kept.newer.revision}` : 'Discard them'}
        </TextButton>
      </p>
    </div>
  );
}

/** Why a save did not go through, and where to look. */
export function SaveNotice({ saving }: { saving: Saving }) {
  const store = useEditorStore();
  const { status } = saving;
  if (status.kind === 'unsettled') {
    return (
      <div role="alert" className="mt-5 border-l-2 border-rust pl-5">
        <p>
          <strong className="font-extrabold">Not saved.</strong>{' '}
          {status.count === 1 ? 'One field holds' : `${status.count} fields hold`} text that is no value yet. Correct
          it, or leave it with Escape.
        </p>
        <TextButton onClick={saving.dismiss}>Close</TextButton>
      </div>
    );
  }
  if (status.kind !== 'failed') return null;
  return (
    <div role="alert" className="mt-5 border-l-2 border-rust pl-5">
      <p>
        <strong className="font-extrabold">Not saved.</strong> {status.message}
      </p>
      <ul className="mt-1">
        {status.problems.slice(0, 6).map(({ path, message }) => (
          <li key={`${path} ${message}`}>
            <TextButton onClick={() => store.focusField(fieldOfPath(store.getState().document, path))}>
              {path}
            </TextButton>
            : {message}
          </li>
        ))}
      </ul>
      <TextButton onClick={() => saving.save()}>Try again</TextButton>
    </div>
  );
}
