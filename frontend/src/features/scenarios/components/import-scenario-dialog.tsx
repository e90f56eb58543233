import { useState } from 'react';
import type { ScenarioDetail, ScenarioFile } from '#common/schemas/api/scenarios.ts';
import type { InputProblem } from '#common/schemas/problem.ts';
import { Button } from '#frontend/components/button.tsx';
import { Dialog, DialogActions } from '#frontend/components/dialog.tsx';
import { ApiError } from '#frontend/lib/api-client.ts';
import { wordsOfError } from '#frontend/lib/form-errors.ts';
import { useImportScenario } from '../api/create-scenario.ts';
import { readScenarioFile } from '../model/read-scenario-file.ts';

export interface ImportScenarioDialogProps {
  projectId: string;
  onClose: () => void;
  onImported: (scenario: ScenarioDetail) => void;
}

interface Refusal {
  reason: string;
  problems: readonly InputProblem[];
}

/** Takes an exported file, shows what it holds or what is wrong with it, and makes a scenario of it. */
export function ImportScenarioDialog({ projectId, onClose, onImported }: ImportScenarioDialogProps) {
  const importing = useImportScenario(projectId);
  const [file, setFile] = useState<ScenarioFile | null>(null);
  const [refusal, setRefusal] = useState<Refusal | null>(null);

  const choose = async (chosen: File | undefined) => {
    setFile(null);
    setRefusal(null);
    if (!chosen) return;
    const read = readScenarioFile(await chosen.text());
    if (read.kind === 'file') setFile(read.file);
    else setRefusal(read);
  };
  const send = () => {
    if (!file) return;
    importing.mutate(file, {
      onSuccess: onImported,
      onError: (error) =>
        setRefusal({
          reason: wordsOfError(error),
          problems: error instanceof ApiError ? (error.problem?.errors ?? []) : [],
        }),
    });
  };
  return (
    <Dialog title="Import a scenario" isOpen onClose={onClose}>
      <label className="block">
        <span className="block text-small text-muted">File exported from Overwinter, JSON</span>
        <input
          type="file"
          accept=".json,application/json"
          onChange={(event) => void choose(event.target.files?.[0])}
          className="mt-2 w-full border-b border-line pb-2 file:mr-4 file:cursor-pointer file:rounded-full file:border file:border-line file:bg-transparent file:px-4 file:py-1.5 file:text-ink"
        />
      </label>
      <div className="min-h-24 pt-4" aria-live="polite">
        {file && <FileContent file={file} />}
        {refusal && <RefusalNote refusal={refusal} />}
      </div>
      <DialogActions>
        <Button onClick={onClose}>Cancel</Button>
        <Button variant="primary" disabled={!file} isBusy={importing.isPending} onClick={send}>
          Import
        </Button>
      </DialogActions>
    </Dialog>
  );
}

function FileContent({ file }: { file: ScenarioFile }) {
  const { name, node, supply } = file.scenario;
  return (
    <p>
      <strong className="font-extrabold">{name}</strong>
      <span className="block text-small text-muted">
        Revision {file.revision}, {node.parts.length} parts, {node.routines.length} routines, {supply.cell.designation}.
        It becomes a new scenario with its own revision 1.
      </span>
    </p>
  );
}

function RefusalNote({ refusal }: { refusal: Refusal }) {
  return (
    <div role="alert" className="border-l-2 border-rust pl-4 text-rust">
      <p>{refusal.reason}</p>
      <ul className="mt-1 text-small">
        {refusal.problems.map((problem) => (
          <li key={problem.path + problem.message}>
            <code>{problem.path}</code>: {problem.message}
          </li>
        ))}
      </ul>
    </div>
  );
}
