import { useId } from 'react';
import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import {
  useEditorStore,
  useFieldProblem,
  useIsReadOnly,
} from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { PlainText } from './bound-fields.tsx';

export interface Choice<T extends string> {
  value: T;
  label: string;
  /** Heading that it stands under in the list; neighbours with the same one stand together. */
  group?: string;
}

interface ChoiceFieldProps<T extends string> {
  field: string;
  label: string;
  editLabel?: string;
  hint?: string;
  value: T;
  choices: readonly Choice<T>[];
  change: (document: Scenario, value: T) => Scenario;
  isCell?: boolean;
}

/** One of a few words of the document. */
export function ChoiceField<T extends string>(props: ChoiceFieldProps<T>) {
  const { field, label, editLabel, hint, value, choices, change, isCell = false } = props;
  const store = useEditorStore();
  const problem = useFieldProblem(field);
  const id = useId();
  if (useIsReadOnly()) {
    const text = choices.find((choice) => choice.value === value)?.label ?? value;
    return <PlainText label={label} text={text} isCell={isCell} />;
  }
  const handleChange = (text: string): void => {
    const choice = choices.find((candidate) => candidate.value === text);
    if (!choice) return;
    store.edit({ label: editLabel ?? label, change: (document) => change(document, choice.value) });
  };
  return (
    <div className="min-w-0">
      <label htmlFor={id} className={isCell ? 'sr-only' : 'block text-small text-muted'}>
        {label}
      </label>
      <select
        id={id}
        data-field={field}
        value={value}
        title={isCell ? problem : undefined}
        aria-invalid={problem === undefined ? undefined : true}
        aria-describedby={problem === undefined && hint === undefined ? undefined : `${id}-note`}
        onChange={(event) => handleChange(event.target.value)}
        className={`${isCell ? CELL : LINE} ${isCell && value === '' ? 'text-muted' : ''}`}
      >
        <Options choices={choices} />
      </select>
      {isCell ? (
        problem !== undefined && (
          <span id={`${id}-note`} className="sr-only">
            {problem}
          </span>
        )
      ) : (
        <p
          id={`${id}-note`}
          className={`min-h-6 pt-1 text-small ${problem === undefined ? 'text-muted' : 'text-rust'}`}
        >
          {problem ?? hint}
        </p>
      )}
    </div>
  );
}

function Options({ choices }: { choices: readonly Choice<string>[] }) {
  const groups = [...new Set(choices.map(({ group }) => group))];
  return groups.map((group) => {
    const options = choices
      .filter((choice) => choice.group === group)
      .map((choice) => (
        <option key={choice.value} value={choice.value}>
          {choice.label}
        </option>
      ));
    return group === undefined ? (
      options
    ) : (
      <optgroup key={group} label={group} className="bg-raised text-ink">
        {options}
      </optgroup>
    );
  });
}

const OPTIONS = '[&>option]:bg-raised [&>option]:text-ink';
const LINE = `h-[2.3125rem] w-full rounded-none border-b border-line bg-transparent font-semibold outline-none hover:border-ink focus-visible:border-accent focus-visible:shadow-[0_1px_0_0_var(--accent)] aria-invalid:border-rust ${OPTIONS}`;
const CELL = `h-9 w-full min-w-0 appearance-none rounded-none border-b border-transparent bg-transparent px-1.5 hover:border-line focus-visible:outline-offset-[-2px] aria-invalid:border-rust aria-invalid:text-rust ${OPTIONS}`;
