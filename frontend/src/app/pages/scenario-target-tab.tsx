import { TargetEditor } from '#frontend/features/scenario-editor/components/target/target-editor.tsx';

export function ScenarioTargetTab() {
  return <TargetEditor />;
}
