import { zodResolver } from '@hookform/resolvers/zod';
import { useId, useState } from 'react';
import { useForm, type UseFormRegisterReturn } from 'react-hook-form';
import { z } from 'zod';
import { scenarioTemplates, TEMPLATE_GROUPS, type ScenarioTemplate } from '#common/catalogue/templates.ts';
import { nameSchema } from '#common/schemas/api/common.ts';
import type { ScenarioDetail } from '#common/schemas/api/scenarios.ts';
import { Button } from '#frontend/components/button.tsx';
import { Dialog, DialogActions } from '#frontend/components/dialog.tsx';
import { TextField } from '#frontend/components/field.tsx';
import { FormError } from '#frontend/components/states.tsx';
import { applyProblems } from '#frontend/lib/form-errors.ts';
import { useCreateScenario } from '../api/create-scenario.ts';

const formSchema = z.object({ name: nameSchema, startId: z.string() });
type Form = z.infer<typeof formSchema>;

export interface CreateScenarioDialogProps {
  projectId: string;
  onClose: () => void;
  onCreated: (scenario: ScenarioDetail) => void;
}

/** Asks for a name and what to begin with: empty or one of the templates. */
export function CreateScenarioDialog({ projectId, onClose, onCreated }: CreateScenarioDialogProps) {
  const [choices] = useState(scenarioTemplates);
  const create = useCreateScenario(projectId);
  const [problem, setProblem] = useState<string | null>(null);
  const { register, handleSubmit, setError, formState } = useForm<Form>({
    resolver: zodResolver(formSchema),
    defaultValues: { name: '', startId: choices[0]?.id ?? '' },
  });
  const submit = handleSubmit(async ({ name, startId }) => {
    setProblem(null);
    const start = choices.find((choice) => choice.id === startId);
    if (!start) return;
    try {
      onCreated(await create.mutateAsync({ document: { ...start.document, name } }));
    } catch (error) {
      setProblem(applyProblems(error, ['name'], setError));
    }
  });
  return (
    <Dialog title="New scenario" isOpen isWide onClose={onClose}>
      <form noValidate onSubmit={submit}>
        <FormError>{problem}</FormError>
        <TextField
          label="Name"
          hint="What sets it apart, such as “two LR6, report every 15 min”"
          error={formState.errors.name?.message}
          {...register('name')}
        />
        <fieldset className="mt-3">
          <legend className="text-small text-muted">Begin with</legend>
          <div className="grid gap-x-10 sm:grid-cols-2">
            {TEMPLATE_GROUPS.map((group) => (
              <TemplateGroup
                key={group.id}
                name={group.name}
                choices={choices.filter((choice) => choice.group === group.id)}
                field={register('startId')}
              />
            ))}
          </div>
        </fieldset>
        <DialogActions>
          <Button onClick={onClose}>Cancel</Button>
          <Button type="submit" variant="primary" isBusy={formState.isSubmitting}>
            Make the scenario
          </Button>
        </DialogActions>
      </form>
    </Dialog>
  );
}

interface TemplateGroupProps {
  name: string;
  choices: readonly ScenarioTemplate[];
  field: UseFormRegisterReturn;
}

function TemplateGroup({ name, choices, field }: TemplateGroupProps) {
  const headingId = useId();
  return (
    <div role="group" aria-labelledby={headingId} className="mt-3">
      <p id={headingId} className="border-b border-line pb-1 text-small font-bold">
        {name}
      </p>
      {choices.map((choice) => (
        <label
          key={choice.id}
          className="flex cursor-pointer items-baseline gap-3 border-b border-hair py-2.5 hover:bg-accent-soft"
        >
          <input type="radio" value={choice.id} className="translate-y-0.5 accent-[var(--accent)]" {...field} />
          <span>
            <span className="block font-semibold">{choice.name}</span>
            <span className="block text-small text-muted">{choice.description}</span>
          </span>
        </label>
      ))}
    </div>
  );
}
