export interface SegmentedProps<Value extends string> {
  label: string;
  value: Value;
  options: readonly { value: Value; label: string }[];
  onChange: (value: Value) => void;
}

/** One choice of a few, all visible: words in a row, the chosen one bold on a rule. */
export function Segmented<Value extends string>({ label, value, options, onChange }: SegmentedProps<Value>) {
  return (
    <fieldset className="flex flex-wrap gap-x-5">
      <legend className="sr-only">{label}</legend>
      {options.map((option) => (
        <label key={option.value} className="cursor-pointer">
          <input
            type="radio"
            name={label}
            value={option.value}
            checked={option.value === value}
            onChange={() => onChange(option.value)}
            className="peer sr-only"
          />
          <span className="block border-b-2 border-transparent py-1.5 text-muted peer-checked:border-accent peer-checked:font-extrabold peer-checked:text-ink peer-focus-visible:outline-2 peer-focus-visible:outline-offset-2 peer-focus-visible:outline-accent hover:text-ink">
            {option.label}
          </span>
        </label>
      ))}
    </fieldset>
  );
}
