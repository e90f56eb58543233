import { useMutation } from '@tanstack/react-query';
import { scenarioFileSchema } from '#common/schemas/api/scenarios.ts';
import { api } from '#frontend/lib/api-client.ts';
import { saveFile } from '#frontend/lib/save-file.ts';

/** Fetches the scenario's file and hands it to the browser to keep. */
export function useExportScenario() {
  return useMutation({
    mutationFn: async ({ id, name }: { id: string; name: string }) => {
      const file = await api.get(`/scenarios/${id}/export`, scenarioFileSchema);
      saveFile(`${fileName(name)}, revision ${file.revision}.json`, JSON.stringify(file, null, 2));
      return file;
    },
  });
}

function fileName(name: string): string {
  return (
    name
      .replace(/[\\/:*?"<>|\p{Cc}]+/gu, ' ')
      .trim()
      .slice(0, 80) || 'scenario'
  );
}
