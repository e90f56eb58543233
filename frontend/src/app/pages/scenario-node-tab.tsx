import { memo, useDeferredValue, useCallback } from 'react';
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

/** Drawn again only when what it shows has changed: the keystroke itself does not wait for it. */
const DayPicture = memo(NodeDay);

function Day() {
  const store = useEditorStore();
  const document = useDeferredValue(useEditorState((state) => state.document));
  const { routineId, stepId } = useEditorState((state) => state.selection);
  const selectStep = useCallback((id: string) => store.select({ stepId: id }), [store]);
  const selectRoutine = useCallback((id: string) => store.select({ routineId: id, stepId: null }), [store]);
  return (
    <DayPicture
      scenario={document}
      routineId={routineId}
      selectedStepId={stepId}
      onSelectStep={selectStep}
      onSelectRoutine={selectRoutine}
    />
  );
}

function Editor() {
  const problems = useForecastProblems();
  return <NodeEditor problems={problems} />;
}
