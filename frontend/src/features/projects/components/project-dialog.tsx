import { zodResolver } from '@hookform/resolvers/zod';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { createProjectSchema, type CreateProject, type Project } from '#common/schemas/api/projects.ts';
import { Button } from '#frontend/components/button.tsx';
import { Dialog, DialogActions } from '#frontend/components/dialog.tsx';
import { TextArea, TextField } from '#frontend/components/field.tsx';
import { FormError } from '#frontend/components/states.tsx';
import { applyProblems } from '#frontend/lib/form-errors.ts';
import { useCreateProject } from '../api/create-project.ts';
import { useUpdateProject } from '../api/update-project.ts';

export interface ProjectDialogProps {
  /** The project to change; absent to make a new one. */
  project?: Project;
  onClose: () => void;
  onSaved: (project: Project) => void;
}

export function ProjectDialog({ project, onClose, onSaved }: ProjectDialogProps) {
  const create = useCreateProject();
  const update = useUpdateProject();
  const [problem, setProblem] = useState<string | null>(null);
  const { register, handleSubmit, setError, formState } = useForm<CreateProject>({
    resolver: zodResolver(createProjectSchema),
    defaultValues: { name: project?.name ?? '', description: project?.description ?? '' },
  });
  const submit = handleSubmit(async (values) => {
    setProblem(null);
    try {
      onSaved(
        project
          ? await update.mutateAsync({ id: project.id, version: project.version, ...values })
          : await create.mutateAsync(values),
      );
    } catch (error) {
      setProblem(applyProblems(error, ['name', 'description'], setError));
    }
  });
  return (
    <Dialog title={project ? 'Rename or describe' : 'New project'} isOpen onClose={onClose}>
      <form noValidate onSubmit={submit}>
        <FormError>{problem}</FormError>
        <TextField
          label="Name"
          hint="The product under design"
          error={formState.errors.name?.message}
          {...register('name')}
        />
        <TextArea
          className="mt-3"
          label="Description"
          error={formState.errors.description?.message}
          {...register('description')}
        />
        <DialogActions>
          <Button onClick={onClose}>Cancel</Button>
          <Button type="submit" variant="primary" isBusy={formState.isSubmitting}>
            {project ? 'Save' : 'Make the project'}
          </Button>
        </DialogActions>
      </form>
    </Dialog>
  );
}
