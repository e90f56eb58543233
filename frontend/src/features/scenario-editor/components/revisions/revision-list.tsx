import { useState, type ReactNode } from 'react';
import type { RevisionSummary } from '#common/schemas/api/scenarios.ts';
import { formatLifeYears } from '#common/units/format-duration.ts';
import { Pagination } from '#frontend/components/pagination.tsx';
import { Empty, ErrorState, Loading } from '#frontend/components/states.tsx';
import { TextButton } from '#frontend/components/button.tsx';
import { dateAndTime } from '#frontend/lib/dates.ts';
import { useEditorState, useIsReadOnly } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { useRevisions } from '#frontend/features/scenario-editor/api/revisions.ts';
import { Section } from '../node/section.tsx';
import { RestoreDialog } from './restore-dialog.tsx';
import { RevisionDiff } from './revision-diff.tsx';

/** The saved states of a scenario, what changed between two of them, and a way back to each. */
export function RevisionList({ scenarioId, exportButton }: { scenarioId: string; exportButton: ReactNode }) {
  const [page, setPage] = useState(1);
  const [compared, setCompared] = useState<{ from: number; to: number } | null>(null);
  const [restored, setRestored] = useState<RevisionSummary | null>(null);
  const { data, error, isPending, refetch } = useRevisions(scenarioId, page);
  return (
    <Section id="revisions" title="Revisions" note={data && `${data.total}; a revision never changes`}>
      <div className="flex justify-end">{exportButton}</div>
      {isPending && <Loading what="Fetching the revisions" />}
      {error && <ErrorState title="The revisions could not be fetched." error={error} onRetry={() => void refetch()} />}
      {data?.total === 0 && <Empty title="No revision yet." />}
      <ul className="mt-2 border-t border-hair">
        {data?.items.map((revision) => (
          <RevisionRow
            key={revision.revision}
            revision={revision}
            isOpen={compared?.to === revision.revision}
            onCompare={() =>
              setCompared(
                compared?.to === revision.revision ? null : { from: revision.revision - 1, to: revision.revision },
              )
            }
            onRestore={() => setRestored(revision)}
          >
            {compared?.to === revision.revision && (
              <RevisionDiff
                scenarioId={scenarioId}
                compared={compared}
                onCompare={setCompared}
                latest={data.items[0]?.revision ?? revision.revision}
              />
            )}
          </RevisionRow>
        ))}
      </ul>
      {data && (
        <Pagination page={data.page} pageSize={data.pageSize} total={data.total} onPage={setPage} what="revisions" />
      )}
      {restored && <RestoreDialog scenarioId={scenarioId} revision={restored} onClose={() => setRestored(null)} />}
    </Section>
  );
}

interface RevisionRowProps {
  revision: RevisionSummary;
  isOpen: boolean;
  onCompare: () => void;
  onRestore: () => void;
  children: ReactNode;
}

function RevisionRow({ revision, isOpen, onCompare, onRestore, children }: RevisionRowProps) {
  const isReadOnly = useIsReadOnly();
  const current = useEditorState((state) => state.saved.revision);
  const { forecast } = revision;
  return (
    <li className="border-b border-hair py-3">
      <div className="flex flex-wrap items-baseline gap-x-6 gap-y-1">
        <h3 className="w-24 font-extrabold">Revision {revision.revision}</h3>
        <p className="min-w-48 flex-1">
          {revision.note === '' ? <span className="text-muted">without a note</span> : revision.note}
          {revision.restoredFrom !== null && (
            <span className="text-muted"> (document of revision {revision.restoredFrom})</span>
          )}
        </p>
        <p className="text-small text-muted tabular-nums">
          {forecast === null
            ? 'no forecast'
            : forecast.lifeS === null
              ? forecast.outcome.replaceAll('-', ' ')
              : `lives ${formatLifeYears(forecast.lifeS)}`}
        </p>
      </div>
      <div className="mt-0.5 flex flex-wrap items-baseline justify-between gap-x-6">
        <p className="text-small text-muted">
          {revision.author}, <time dateTime={revision.createdAt}>{dateAndTime(revision.createdAt)}</time>
        </p>
        <p className="flex gap-5 text-small">
          {revision.revision > 1 && (
            <TextButton aria-expanded={isOpen} onClick={onCompare}>
              {isOpen ? 'Hide what changed' : 'What changed'}
            </TextButton>
          )}
          {!isReadOnly && revision.revision !== current && (
            <TextButton onClick={onRestore}>Restore revision {revision.revision}</TextButton>
          )}
          {revision.revision === current && <span className="text-muted">the one on this page</span>}
        </p>
      </div>
      {children}
    </li>
  );
}
