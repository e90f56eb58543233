interface Props {
  label: string;
  isOpen: boolean;
  onToggle: () => void;
}

/** Opens the range of a figure that has none yet. */
export function RangeToggle({ label, isOpen, onToggle }: Props) {
  return (
    <button
      type="button"
      aria-expanded={isOpen}
      aria-label={`Range of ${label}`}
      onClick={onToggle}
      className="rounded-sm px-1 py-0.5 text-small whitespace-nowrap text-muted hover:text-ink"
    >
      {isOpen ? 'no range' : '± range'}
    </button>
  );
}
