import { ClimateEditor } from '#frontend/features/scenario-editor/components/climate/climate-editor.tsx';

export function ScenarioClimateTab() {
  return <ClimateEditor />;
}
