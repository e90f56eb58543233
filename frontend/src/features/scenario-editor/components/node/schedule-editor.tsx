import type { Routine, Schedule, When } from '#common/engine/scenario/scenario.types.ts';
import { MONTH_NAMES } from '#common/units/format-duration.ts';
import { useEditorStore, useIsReadOnly } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { TEMPERATURE } from '#frontend/features/scenario-editor/model/figure-options.ts';
import {
  scheduleOfKind,
  updateRoutine,
} from '#frontend/features/scenario-editor/model/operations/routine-operations.ts';
import { withOptional } from '#frontend/features/scenario-editor/model/operations/supply-operations.ts';
import { FigureField } from '../fields/bound-fields.tsx';
import { ChoiceField } from '../fields/choice-field.tsx';
import { ScheduleFigures } from './schedule-figures.tsx';

const KINDS: readonly { value: Schedule['kind']; label: string }[] = [
  { value: 'every', label: 'every …' },
  { value: 'random', label: 'at random' },
  { value: 'window', label: 'in a daily window' },
  { value: 'once', label: 'once' },
  { value: 'always', label: 'always' },
];

/** When a routine runs. */
export function ScheduleEditor({ routine }: { routine: Routine }) {
  const field = `node.routines.${routine.id}.schedule`;
  return (
    <div className="grid grid-cols-2 gap-x-6 sm:grid-cols-4">
      <ChoiceField
        field={`${field}.kind`}
        label="Runs"
        editLabel={`schedule of ${routine.name}`}
        value={routine.schedule.kind}
        choices={KINDS}
        change={(document, kind) =>
          updateRoutine(document, routine.id, (before) => ({
            ...before,
            schedule: scheduleOfKind(kind, before.schedule),
          }))
        }
      />
      <ScheduleFigures routine={routine} field={field} />
      <Condition routine={routine} field={field} side="belowC" label="Only below" />
      <Condition routine={routine} field={field} side="aboveC" label="Only above" />
      <Months routine={routine} />
    </div>
  );
}

function withWhen(routine: Routine, apply: (when: When) => When): Routine {
  const when = apply(routine.schedule.when ?? {});
  const isEmpty = Object.values(when).every((value) => value === undefined);
  return { ...routine, schedule: withOptional(routine.schedule, 'when', isEmpty ? undefined : when) };
}

interface ConditionProps {
  routine: Routine;
  field: string;
  side: 'belowC' | 'aboveC';
  label: string;
}

function Condition({ routine, field, side, label }: ConditionProps) {
  return (
    <FigureField
      field={`${field}.when.${side}`}
      label={label}
      editLabel={`${label.toLowerCase()} of ${routine.name}`}
      hint="mean of ten days"
      value={routine.schedule.when?.[side]}
      options={TEMPERATURE}
      isOptional
      change={(document, value) =>
        updateRoutine(document, routine.id, (before) => withWhen(before, (when) => withOptional(when, side, value)))
      }
    />
  );
}

function Months({ routine }: { routine: Routine }) {
  const store = useEditorStore();
  const isReadOnly = useIsReadOnly();
  const months = routine.schedule.when?.months ?? [];
  const toggle = (month: number): void =>
    store.edit({
      label: `months of ${routine.name}`,
      change: (document) =>
        updateRoutine(document, routine.id, (before) =>
          withWhen(before, (when) => {
            const chosen = when.months ?? [];
            const next = chosen.includes(month) ? chosen.filter((other) => other !== month) : [...chosen, month];
            return withOptional(when, 'months', next.length === 0 ? undefined : next.sort((a, b) => a - b));
          }),
        ),
    });
  return (
    <fieldset className="col-span-full mb-2 min-w-0">
      <legend className="text-small text-muted">Only in these months (none chosen: all the year)</legend>
      <div className="mt-1 flex flex-wrap gap-x-1 gap-y-1">
        {MONTH_NAMES.map((name, index) => (
          <label key={name} className="cursor-pointer">
            <input
              type="checkbox"
              className="peer sr-only"
              checked={months.includes(index + 1)}
              disabled={isReadOnly}
              onChange={() => toggle(index + 1)}
            />
            <span
              title={name}
              className="block border-b-2 border-transparent px-1.5 py-1 text-small text-muted peer-checked:border-accent peer-checked:font-extrabold peer-checked:text-ink peer-focus-visible:outline-2 peer-focus-visible:outline-accent hover:text-ink"
            >
              {name.slice(0, 3)}
              <span className="sr-only">{name.slice(3)}</span>
            </span>
          </label>
        ))}
      </div>
    </fieldset>
  );
}
