import { useState } from 'react';
import { Button } from '#frontend/components/button.tsx';
import { Dialog, DialogActions } from '#frontend/components/dialog.tsx';
import { TextArea } from '#frontend/components/field.tsx';
import { dateAndTime, dayOrTime } from '#frontend/lib/dates.ts';
import { LIMITS } from '#common/schemas/limits.ts';
import {
  useDocument,
  useEditorState,
  useEditorStore,
  useIsReadOnly,
} from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import type { Saving } from '#frontend/features/scenario-editor/hooks/use-save.ts';
import { isDirty } from '#frontend/features/scenario-editor/model/editor-state.ts';
import { TextFieldOf } from '../fields/bound-fields.tsx';

interface ScenarioHeaderProps {
  saving: Saving;
  /** Whether unsaved work can be kept in this browser. */
  isKept: boolean;
}

/** The line above the tabs: what this is, how it is saved, and the way back and forth in what was done. */
export function ScenarioHeader({ saving, isKept }: ScenarioHeaderProps) {
  const name = useDocument((document) => document.name);
  const isReadOnly = useIsReadOnly();
  return (
    <div className="sticky top-0 z-20 border-b border-hair bg-paper">
      <div className="page flex flex-wrap items-center gap-x-4 wide:max-w-[104rem] py-2 sm:gap-x-6">
        <h1 className="sr-only">{name}</h1>
        <div className="-ml-1.5 min-w-0 basis-2/3 text-lg font-semibold sm:flex-1 sm:basis-0">
          <TextFieldOf
            field="name"
            isCell
            label="Name of the scenario"
            value={name}
            change={(document, next) => ({ ...document, name: next })}
          />
        </div>
        {!isReadOnly && <HistoryButtons />}
        <SaveState saving={saving} isKept={isKept} />
        {!isReadOnly && <SaveButtons saving={saving} />}
      </div>
    </div>
  );
}

function SaveState({ saving, isKept }: ScenarioHeaderProps) {
  const saved = useEditorState((state) => state.saved);
  const isChanged = useEditorState(isDirty);
  const isReadOnly = useIsReadOnly();
  const { status } = saving;
  const rest = `revision ${saved.revision}, saved ${dayOrTime(saved.savedAt)}`;
  const text =
    status.kind === 'saving'
      ? 'Saving …'
      : status.kind === 'offline'
        ? 'Not reached: kept here, saved as soon as the server answers'
        : isChanged
          ? `Unsaved changes to revision ${saved.revision}${isKept ? '' : ', and no room to keep them in this browser'}`
          : rest;
  return (
    <p
      role="status"
      title={`Revision ${saved.revision}, saved ${dateAndTime(saved.savedAt)} by ${saved.savedBy}`}
      className={`max-sm:flex-1 sm:order-none text-small ${isChanged && status.kind !== 'saving' ? 'text-caution' : 'text-muted'}`}
    >
      {text}
      {isReadOnly && ', for reading'}
    </p>
  );
}

function HistoryButtons() {
  const store = useEditorStore();
  const undoLabel = useEditorState((state) => state.past.at(-1)?.label);
  const redoLabel = useEditorState((state) => state.future.at(-1)?.label);
  const announcement = useEditorState((state) => state.announcement);
  return (
    <div role="group" aria-label="History" className="flex items-center max-sm:ml-auto sm:order-1">
      <HistoryButton name="Undo" what={undoLabel} shortcuts="Control+Z" onClick={store.undo} />
      <HistoryButton name="Redo" what={redoLabel} shortcuts="Control+Shift+Z Control+Y" onClick={store.redo} />
      <span role="status" className="sr-only">
        {announcement}
      </span>
    </div>
  );
}

interface HistoryButtonProps {
  name: 'Undo' | 'Redo';
  /** The edit that it takes back or makes again; undefined when there is none. */
  what: string | undefined;
  shortcuts: string;
  onClick: () => void;
}

function HistoryButton({ name, what, shortcuts, onClick }: HistoryButtonProps) {
  return (
    <button
      type="button"
      aria-label={name}
      title={what === undefined ? name : `${name}: ${what}`}
      aria-keyshortcuts={shortcuts}
      disabled={what === undefined}
      onClick={onClick}
      className="inline-flex size-9 items-center justify-center rounded-full text-muted enabled:hover:bg-accent-soft enabled:hover:text-ink disabled:opacity-40"
    >
      <CurvedArrow isForward={name === 'Redo'} />
    </button>
  );
}

function CurvedArrow({ isForward = false }: { isForward?: boolean }) {
  return (
    <svg viewBox="0 0 20 20" className={`size-5 ${isForward ? '-scale-x-100' : ''}`} aria-hidden="true">
      <path
        d="M7 4 3 8l4 4M3.5 8H12a4.5 4.5 0 0 1 0 9H8"
        fill="none"
        stroke="currentColor"
        strokeWidth="1.6"
        strokeLinecap="round"
        strokeLinejoin="round"
      />
    </svg>
  );
}

function SaveButtons({ saving }: { saving: Saving }) {
  const isChanged = useEditorState(isDirty);
  const [isNoting, setNoting] = useState(false);
  const [note, setNote] = useState('');
  const save = (): void => {
    saving.save(note.trim());
    setNote('');
    setNoting(false);
  };
  return (
    <div className="flex items-center gap-3 sm:order-2">
      <button
        type="button"
        disabled={!isChanged}
        onClick={() => setNoting(true)}
        className="min-h-9 rounded-sm text-small text-muted enabled:hover:text-ink enabled:hover:underline enabled:hover:underline-offset-4 disabled:opacity-55"
      >
        with a note
      </button>
      <Button
        variant="primary"
        aria-keyshortcuts="Control+S"
        disabled={!isChanged}
        isBusy={saving.status.kind === 'saving'}
        onClick={() => saving.save()}
      >
        Save
      </Button>
      <Dialog title="Save with a note" isOpen={isNoting} onClose={() => setNoting(false)}>
        <TextArea
          label="What changed, and why"
          hint="Stands beside the revision."
          maxLength={LIMITS.noteLength}
          value={note}
          onChange={(event) => setNote(event.target.value)}
        />
        <DialogActions>
          <Button onClick={() => setNoting(false)}>Cancel</Button>
          <Button variant="primary" onClick={save}>
            Save
          </Button>
        </DialogActions>
      </Dialog>
    </div>
  );
}
