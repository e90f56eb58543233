import { ErrorState, Loading } from '#frontend/components/states.tsx';
import { useRevisionDiff } from '#frontend/features/scenario-editor/api/revisions.ts';
import { ChangeList } from './change-list.tsx';

interface RevisionDiffProps {
  scenarioId: string;
  compared: { from: number; to: number };
  latest: number;
  onCompare: (compared: { from: number; to: number }) => void;
}

/** What changed up to a revision, from the one before or any earlier one. */
export function RevisionDiff({ scenarioId, compared, latest, onCompare }: RevisionDiffProps) {
  const { from, to } = compared;
  const { data, error, refetch } = useRevisionDiff(scenarioId, from, to);
  const others = Array.from({ length: Math.min(latest, 200) }, (_, index) => latest - index).filter(
    (revision) => revision !== to && revision > 0,
  );
  return (
    <div className="mt-3 border-l-2 border-hair pl-5">
      <label className="text-small text-muted">
        Compared with revision{' '}
        <select
          value={from}
          onChange={(event) => onCompare({ from: Number(event.target.value), to })}
          className="border-b border-line bg-transparent py-0.5 font-semibold text-ink [&>option]:bg-raised"
        >
          {others.map((revision) => (
            <option key={revision} value={revision}>
              {revision}
            </option>
          ))}
        </select>
      </label>
      {error && (
        <ErrorState title="The difference could not be fetched." error={error} onRetry={() => void refetch()} />
      )}
      {!data && !error && <Loading what="Comparing" />}
      {data && <ChangeList label={`Changes from revision ${from} to ${to}`} changes={data.changes} />}
    </div>
  );
}
