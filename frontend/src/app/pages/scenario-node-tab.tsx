import { useDeferredValue } from 'react';
import { NodeDay } from '#frontend/features/node-day/components/node-day.tsx';
import { NodeEditor } from '#frontend/features/scenario-editor/components/node/node-editor.tsx';
import { useEditorState, useEditorStore } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { useForecastProblems } from '../live-forecast-provider.tsx';

export function ScenarioNodeTab() {
  return (
    <>
      <div className="mt-8">
        <Day />
      </div>
      <Editor />
    </>
  );
}

function Day() {
  const store = useEditorStore();
  const document = useDeferredValue(useEditorState((state) => state.document));
  const { routineId, stepId } = useEditorState((state) => state.selection);
  return (
    <NodeDay
      scenario={document}
      routineId={routineId}
      selectedStepId={stepId}
      onSelectStep={(id) => store.select({ stepId: id })}
      onSelectRoutine={(id) => store.select({ routineId: id, stepId: null })}
    />
  );
}

function Editor() {
  const problems = useForecastProblems();
  return <NodeEditor problems={problems} />;
}
