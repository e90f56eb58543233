import { useOutletContext } from 'react-router-dom';
import { TextButton } from '#frontend/components/button.tsx';
import { RevisionList } from '#frontend/features/scenario-editor/components/revisions/revision-list.tsx';
import { useDocument } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { useExportScenario } from '#frontend/features/scenarios/api/export-scenario.ts';
import { wordsOfError } from '#frontend/lib/form-errors.ts';

export function ScenarioRevisionsTab() {
  const { scenarioId } = useOutletContext<{ scenarioId: string }>();
  return <RevisionList scenarioId={scenarioId} exportButton={<ExportButton scenarioId={scenarioId} />} />;
}

function ExportButton({ scenarioId }: { scenarioId: string }) {
  const name = useDocument((document) => document.name);
  const exporting = useExportScenario();
  return (
    <div>
      <TextButton disabled={exporting.isPending} onClick={() => exporting.mutate({ id: scenarioId, name })}>
        Export the latest revision as a file
      </TextButton>
      {exporting.isError && <p className="text-small text-rust">{wordsOfError(exporting.error)}</p>}
    </div>
  );
}
