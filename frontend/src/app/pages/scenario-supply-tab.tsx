import { SupplyEditor } from '#frontend/features/scenario-editor/components/supply/supply-editor.tsx';

export function ScenarioSupplyTab() {
  return <SupplyEditor />;
}
