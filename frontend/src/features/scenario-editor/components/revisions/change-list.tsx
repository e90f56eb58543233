import type { Change } from '#common/schemas/api/scenarios.ts';
import { valueWords } from '#frontend/features/scenario-editor/model/change-words.ts';

interface ChangeListProps {
  label: string;
  changes: readonly Change[];
  /** Paths that others changed too. */
  contested?: ReadonlySet<string>;
}

/** What changed, in words, a line each. */
export function ChangeList({ label, changes, contested }: ChangeListProps) {
  if (changes.length === 0) return <p className="py-2 text-muted">Nothing.</p>;
  return (
    <ul aria-label={label}>
      {changes.map((change, index) => (
        <li
          key={`${index} ${change.path}`}
          className="flex flex-wrap items-baseline justify-between gap-x-6 border-b border-hair py-1.5"
        >
          <span>
            {change.label}
            {contested?.has(change.path) === true && (
              <span className="ml-2 text-small font-semibold text-caution italic">changed on both sides</span>
            )}
          </span>
          <ChangeValues change={change} />
        </li>
      ))}
    </ul>
  );
}

function ChangeValues({ change }: { change: Change }) {
  const before = valueWords(change, change.before);
  const after = valueWords(change, change.after);
  switch (change.kind) {
    case 'added':
      return <span className="text-muted">added{after === null ? '' : `: ${after}`}</span>;
    case 'removed':
      return <span className="text-muted">removed{before === null ? '' : `: ${before}`}</span>;
    case 'moved':
      return <span className="text-muted">moved</span>;
    case 'changed':
      return (
        <span className="tabular-nums">
          {before !== null && after !== null ? (
            <>
              <span className="text-muted">{before} → </span>
              <strong>{after}</strong>
            </>
          ) : (
            'changed'
          )}
        </span>
      );
  }
}
