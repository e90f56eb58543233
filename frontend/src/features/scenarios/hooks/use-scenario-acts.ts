import { useNavigate } from 'react-router-dom';
import type { ScenarioSummary } from '#common/schemas/api/scenarios.ts';
import { LIMITS } from '#common/schemas/limits.ts';
import { useToast } from '#frontend/components/toast.tsx';
import { wordsOfError } from '#frontend/lib/form-errors.ts';
import { useArchiveScenario } from '../api/archive-scenario.ts';
import { useDuplicateScenario } from '../api/duplicate-scenario.ts';
import { useExportScenario } from '../api/export-scenario.ts';

export interface ScenarioActs {
  archive: (scenario: ScenarioSummary, archived: boolean) => void;
  duplicate: (scenario: ScenarioSummary) => void;
  exportFile: (scenario: ScenarioSummary) => void;
}

/** What a row of the list can do, each told in a message. */
export function useScenarioActs(): ScenarioActs {
  const toast = useToast();
  const navigate = useNavigate();
  const archiving = useArchiveScenario();
  const duplicating = useDuplicateScenario();
  const exporting = useExportScenario();
  const onError = (error: unknown): void => toast({ text: wordsOfError(error), isError: true });

  const archive = (scenario: ScenarioSummary, archived: boolean, canUndo: boolean): void =>
    archiving.mutate(
      { id: scenario.id, version: scenario.version, archived },
      {
        onSuccess: (stored) =>
          toast({
            text: `“${scenario.name}” ${archived ? 'is in the archive.' : 'is in use again.'}`,
            ...(canUndo ? { undo: () => archive(stored, !archived, false) } : {}),
          }),
        onError,
      },
    );
  return {
    archive: (scenario, archived) => archive(scenario, archived, true),
    duplicate: (scenario) =>
      duplicating.mutate(
        { id: scenario.id, name: copyName(scenario.name) },
        { onSuccess: (copy) => void navigate(`/scenarios/${copy.id}`), onError },
      ),
    exportFile: (scenario) => exporting.mutate({ id: scenario.id, name: scenario.name }, { onError }),
  };
}

function copyName(name: string): string {
  return `${name.slice(0, LIMITS.nameLength - 7)}, copy`;
}
