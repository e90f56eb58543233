import { useState } from 'react';
import type { Provenance, Quantity, Scenario } from '#common/engine/scenario/scenario.types.ts';
import { LIMITS } from '#common/schemas/limits.ts';
import { Button } from '#frontend/components/button.tsx';
import { Dialog, DialogActions } from '#frontend/components/dialog.tsx';
import { SelectField, TextArea } from '#frontend/components/field.tsx';
import { useEditorStore, useIsReadOnly } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { kindOf } from '#frontend/features/scenario-editor/model/quantity-sides.ts';
import { PROVENANCE_KINDS, provenanceWord } from '#frontend/features/scenario-editor/model/words.ts';

export type ChangeQuantity = (document: Scenario, update: (quantity: Quantity) => Quantity) => Scenario;

interface ProvenanceMarkProps {
  /** What the figure is: "Radio, transmit: current". */
  label: string;
  quantity: Quantity;
  change: ChangeQuantity;
}

/** Where a figure comes from, in a word; opens what stands behind it. Assumed figures stand out. */
export function ProvenanceMark({ label, quantity, change }: ProvenanceMarkProps) {
  const [isOpen, setOpen] = useState(false);
  const kind = kindOf(quantity);
  const text = quantity.provenance?.text;
  return (
    <>
      <button
        type="button"
        onClick={() => setOpen(true)}
        title={text ?? PROVENANCE_KINDS.find(({ value }) => value === kind)?.explanation}
        aria-label={`${label}: ${provenanceWord(kind)}${text === undefined ? '' : `, ${text}`}`}
        className={`rounded-sm py-0.5 text-small whitespace-nowrap underline decoration-dotted underline-offset-4 hover:decoration-solid ${kind === 'assumed' ? 'font-semibold text-caution italic' : 'text-muted'}`}
      >
        {provenanceWord(kind)}
      </button>
      <Dialog title={`Where it comes from: ${label}`} isOpen={isOpen} onClose={() => setOpen(false)}>
        <ProvenanceForm
          provenance={quantity.provenance}
          label={label}
          onClose={() => setOpen(false)}
          change={(provenance) => (document) => change(document, (before) => ({ ...before, provenance }))}
        />
      </Dialog>
    </>
  );
}

interface ProvenanceFormProps {
  label: string;
  provenance: Provenance | undefined;
  change: (provenance: Provenance) => (document: Scenario) => Scenario;
  onClose: () => void;
}

function ProvenanceForm({ label, provenance, change, onClose }: ProvenanceFormProps) {
  const store = useEditorStore();
  const isReadOnly = useIsReadOnly();
  const [kind, setKind] = useState(provenance?.kind ?? 'assumed');
  const [text, setText] = useState(provenance?.text ?? '');
  const chosen = PROVENANCE_KINDS.find(({ value }) => value === kind);
  if (isReadOnly) {
    return (
      <>
        <p className="font-semibold">{chosen?.label}</p>
        <p className="mt-1 text-muted">{text === '' ? chosen?.explanation : text}</p>
        <DialogActions>
          <Button onClick={onClose}>Close</Button>
        </DialogActions>
      </>
    );
  }
  const save = (): void => {
    const next: Provenance = {
      kind,
      ...(text.trim() === '' ? {} : { text: text.trim() }),
      ...(provenance?.traceId === undefined ? {} : { traceId: provenance.traceId }),
    };
    store.edit({ label: `where ${label} comes from`, change: change(next) });
    onClose();
  };
  return (
    <>
      <SelectField
        label="Kind"
        value={kind}
        hint={chosen?.explanation}
        onChange={(event) => setKind(PROVENANCE_KINDS.find(({ value }) => value === event.target.value)?.value ?? kind)}
      >
        {PROVENANCE_KINDS.map((row) => (
          <option key={row.value} value={row.value}>
            {row.label}
          </option>
        ))}
      </SelectField>
      <TextArea
        label="In words"
        hint="Document and page, the board measured, or the reason for the assumption."
        maxLength={LIMITS.provenanceLength}
        value={text}
        onChange={(event) => setText(event.target.value)}
      />
      <DialogActions>
        <Button onClick={onClose}>Cancel</Button>
        <Button variant="primary" onClick={save}>
          Keep
        </Button>
      </DialogActions>
    </>
  );
}
