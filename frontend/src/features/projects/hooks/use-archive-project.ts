import type { Project } from '#common/schemas/api/projects.ts';
import { useToast } from '#frontend/components/toast.tsx';
import { wordsOfError } from '#frontend/lib/form-errors.ts';
import { useUpdateProject } from '../api/update-project.ts';

/** Archives a project or takes it back out; the message offers the way back. */
export function useArchiveProject(): (project: Project, archived: boolean) => void {
  const toast = useToast();
  const update = useUpdateProject();
  const set = (project: Project, archived: boolean, canUndo = true): void => {
    update.mutate(
      { id: project.id, version: project.version, archived },
      {
        onSuccess: (stored) =>
          toast({
            text: `“${project.name}” ${archived ? 'is in the archive.' : 'is in use again.'}`,
            ...(canUndo ? { undo: () => set(stored, !archived, false) } : {}),
          }),
        onError: (error) => toast({ text: wordsOfError(error), isError: true }),
      },
    );
  };
  return (project, archived) => set(project, archived);
}
