import { useEffect, useId, useState } from 'react';
import { useDebounced } from '#frontend/hooks/use-debounced.ts';

export interface SearchFieldProps {
  label: string;
  value: string;
  onChange: (value: string) => void;
}

/** Narrows a list while one types; the list asks only when typing pauses. */
export function SearchField({ label, value, onChange }: SearchFieldProps) {
  const id = useId();
  const [typed, setTyped] = useState(value);
  const settled = useDebounced(typed.trim(), 250);
  useEffect(() => {
    if (settled !== value) onChange(settled);
    // Only typing asks anew; a change of the value from outside must not write the old text back.
    // eslint-disable-next-line react-hooks/exhaustive-deps -- see above
  }, [settled]);
  return (
    <div>
      <label htmlFor={id} className="sr-only">
        {label}
      </label>
      <input
        id={id}
        type="search"
        placeholder={label}
        value={typed}
        onChange={(event) => setTyped(event.target.value)}
        className="w-64 max-w-full border-b border-line bg-transparent py-1.5 outline-none hover:border-ink focus-visible:border-accent focus-visible:shadow-[0_1px_0_0_var(--accent)]"
      />
    </div>
  );
}
