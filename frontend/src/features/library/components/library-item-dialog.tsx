import { zodResolver } from '@hookform/resolvers/zod';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { z } from 'zod';
import { nameSchema, noteSchema } from '#common/schemas/api/common.ts';
import type { LibraryItem } from '#common/schemas/api/library.ts';
import { Button } from '#frontend/components/button.tsx';
import { Dialog, DialogActions } from '#frontend/components/dialog.tsx';
import { TextArea, TextField } from '#frontend/components/field.tsx';
import { FormError } from '#frontend/components/states.tsx';
import { applyProblems } from '#frontend/lib/form-errors.ts';
import { useCreateLibraryItem, useUpdateLibraryItem } from '../api/change-library.ts';

const formSchema = z.object({ name: nameSchema, note: noteSchema });
type Form = z.infer<typeof formSchema>;

export interface LibraryItemDialogProps {
  item: LibraryItem;
  /** `copy` makes a new item of the workspace with the same figures, `edit` renames the item itself. */
  act: 'copy' | 'edit';
  onClose: () => void;
  onSaved: (item: LibraryItem) => void;
}

export function LibraryItemDialog({ item, act, onClose, onSaved }: LibraryItemDialogProps) {
  const create = useCreateLibraryItem();
  const update = useUpdateLibraryItem();
  const [problem, setProblem] = useState<string | null>(null);
  const isCopy = act === 'copy' || item.version === null;
  const { register, handleSubmit, setError, formState } = useForm<Form>({
    resolver: zodResolver(formSchema),
    defaultValues: { name: isCopy ? `${item.name}, own` : item.name, note: item.note },
  });
  const submit = handleSubmit(async (values) => {
    setProblem(null);
    try {
      onSaved(
        isCopy || item.version === null
          ? await create.mutateAsync({ ...values, content: item.content })
          : await update.mutateAsync({ id: item.id, version: item.version, ...values }),
      );
    } catch (error) {
      setProblem(applyProblems(error, ['name', 'note'], setError));
    }
  });
  return (
    <Dialog title={isCopy ? 'Copy into the library' : 'Rename or note'} isOpen onClose={onClose}>
      <form noValidate onSubmit={submit}>
        <FormError>{problem}</FormError>
        <TextField label="Name" error={formState.errors.name?.message} {...register('name')} />
        <TextArea
          className="mt-3"
          label="Note"
          hint="What it is, and where its figures come from"
          error={formState.errors.note?.message}
          {...register('note')}
        />
        <DialogActions>
          <Button onClick={onClose}>Cancel</Button>
          <Button type="submit" variant="primary" isBusy={formState.isSubmitting}>
            {isCopy ? 'Copy' : 'Save'}
          </Button>
        </DialogActions>
      </form>
    </Dialog>
  );
}
