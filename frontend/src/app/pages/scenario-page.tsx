import { memo, useDeferredValue, useState } from 'react';
import { Outlet, useLocation, useNavigate, useParams } from 'react-router-dom';
import type { ScenarioDetail } from '#common/schemas/api/scenarios.ts';
import { Breadcrumb } from '#frontend/components/frame-slots.tsx';
import { ErrorState, Loading } from '#frontend/components/states.tsx';
import { Tabs } from '#frontend/components/tabs.tsx';
import { ForecastAnswer, type ForecastAnswerProps } from '#frontend/features/forecast/components/forecast-answer.tsx';
import { ForecastDetails } from '#frontend/features/forecast/components/forecast-details.tsx';
import { ForecastPanel } from '#frontend/features/forecast/components/forecast-panel.tsx';
import { useScenario } from '#frontend/features/scenario-editor/api/scenario.ts';
import { ConflictDialog } from '#frontend/features/scenario-editor/components/frame/conflict-dialog.tsx';
import { KeptWorkNotice, SaveNotice } from '#frontend/features/scenario-editor/components/frame/notices.tsx';
import { ScenarioHeader } from '#frontend/features/scenario-editor/components/frame/scenario-header.tsx';
import {
  EditorProvider,
  useDocument,
  useEditorState,
  useEditorStore,
  useIsReadOnly,
} from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { useDraftKeeping } from '#frontend/features/scenario-editor/hooks/use-draft-keeping.ts';
import { useEditorKeys } from '#frontend/features/scenario-editor/hooks/use-editor-keys.ts';
import { useFocusRequests } from '#frontend/features/scenario-editor/hooks/use-focus-requests.ts';
import { useSave, type Saving } from '#frontend/features/scenario-editor/hooks/use-save.ts';
import { readDraft } from '#frontend/features/scenario-editor/model/draft-storage.ts';
import { discardKept, openScenario, type KeptWork } from '#frontend/features/scenario-editor/model/opening.ts';
import { useSession } from '#frontend/features/session/hooks/use-session.ts';
import { ApiError } from '#frontend/lib/api-client.ts';
import { LiveForecastProvider, useForecastInPictures, useForecastOnPage } from '../live-forecast-provider.tsx';
import { NotFoundPage } from './not-found-page.tsx';

const TABS = [
  { to: '.', label: 'Node', end: true },
  { to: 'supply', label: 'Supply' },
  { to: 'climate', label: 'Climate' },
  { to: 'target', label: 'Target' },
  { to: 'revisions', label: 'Revisions' },
];

export function ScenarioPage() {
  const { scenarioId = '' } = useParams();
  const scenario = useScenario(scenarioId);
  const session = useSession();
  if (scenario.data && session) {
    return <OpenScenario key={scenarioId} detail={scenario.data} editorId={session.canEdit ? session.user.id : null} />;
  }
  if (scenario.error instanceof ApiError && [400, 404].includes(scenario.error.status)) return <NotFoundPage />;
  return (
    <div className="page pt-10">
      {scenario.isPending && <Loading what="Opening the scenario" />}
      {scenario.isError && (
        <ErrorState
          title="The scenario could not be opened."
          error={scenario.error}
          onRetry={() => void scenario.refetch()}
        />
      )}
    </div>
  );
}

/** @param editorId who may change it; null: for reading only */
function OpenScenario({ detail, editorId }: { detail: ScenarioDetail; editorId: string | null }) {
  // Opened once: what comes from the server later is told by saving, never put in the place of what is being typed.
  const [{ store, kept }] = useState(() =>
    openScenario(
      detail,
      editorId === null ? null : readDraft(localStorage, { userId: editorId, scenarioId: detail.id }),
    ),
  );
  return (
    <EditorProvider store={store} isReadOnly={editorId === null}>
      <ScenarioFrame
        editorId={editorId}
        scenarioId={detail.id}
        project={{ id: detail.projectId, name: detail.projectName }}
        kept={kept}
      />
    </EditorProvider>
  );
}

interface ScenarioFrameProps {
  editorId: string | null;
  scenarioId: string;
  project: { id: string; name: string };
  kept: KeptWork | null;
}

function ScenarioFrame({ editorId, scenarioId, project, kept: keptAtFirst }: ScenarioFrameProps) {
  const store = useEditorStore();
  const isReadOnly = useIsReadOnly();
  const saving = useSave(store, scenarioId);
  const isKept = useDraftKeeping(store, editorId, scenarioId);
  const [kept, setKept] = useState(keptAtFirst);
  const base = `/scenarios/${scenarioId}`;
  const navigate = useNavigate();
  const tab = tabOfPath(useLocation().pathname, base);
  useEditorKeys(store, saving.save, isReadOnly);
  useFocusRequests(tab, (next) => void navigate(next === 'node' ? base : `${base}/${next}`));
  const { status } = saving;
  return (
    <LiveForecastProvider serverProblems={status.kind === 'failed' ? status.problems : NO_PROBLEMS}>
      <ScenarioName project={project} />
      <ScenarioHeader saving={saving} isKept={isKept} />
      <div className="page wide:max-w-[104rem]">
        <Notices kept={kept} onSettled={() => setKept(null)} saving={saving} />
        <div className="mt-5 lg:grid lg:grid-cols-[minmax(0,1fr)_minmax(17rem,21.5rem)] lg:gap-x-12 wide:gap-x-16">
          <div className="min-w-0">
            <div className="mb-4 lg:hidden">
              <SentenceOnTop />
            </div>
            <Tabs
              label="Parts of the scenario"
              tabs={TABS.map((row) => ({ ...row, to: row.to === '.' ? base : `${base}/${row.to}` }))}
            />
            <Outlet context={{ scenarioId }} />
            {tab !== 'revisions' && <Details />}
          </div>
          <aside className="max-lg:mt-14 lg:sticky lg:top-16 lg:max-h-[calc(100dvh-4rem)] lg:self-start lg:overflow-y-auto lg:border-l lg:border-hair lg:pb-6 lg:pl-8">
            <Answer />
          </aside>
        </div>
      </div>
      {status.kind === 'conflict' && <ConflictDialog saving={saving} theirs={status.theirs} />}
    </LiveForecastProvider>
  );
}

const NO_PROBLEMS: never[] = [];

function tabOfPath(pathname: string, base: string): 'node' | 'supply' | 'climate' | 'target' | 'revisions' {
  const last = pathname.slice(base.length).replace(/^\//, '').replace(/\/$/, '');
  return last === 'supply' || last === 'climate' || last === 'target' || last === 'revisions' ? last : 'node';
}

function ScenarioName({ project }: { project: ScenarioFrameProps['project'] }) {
  const name = useDocument((document) => document.name);
  return (
    <>
      <title>{`${name} · Overwinter`}</title>
      <Breadcrumb
        crumbs={[
          { label: 'Projects', to: '/projects' },
          { label: project.name, to: `/projects/${project.id}` },
          { label: name },
        ]}
      />
    </>
  );
}

function Notices({ kept, onSettled, saving }: { kept: KeptWork | null; onSettled: () => void; saving: Saving }) {
  const store = useEditorStore();
  return (
    <>
      {kept && (
        <KeptWorkNotice
          kept={kept}
          onKeep={onSettled}
          onDiscard={() => {
            discardKept(store, kept);
            onSettled();
          }}
        />
      )}
      <SaveNotice saving={saving} />
    </>
  );
}

// Pictures are drawn again only when what they show has changed: a keystroke does not wait for them.
const AnswerPicture = memo(ForecastAnswer);
const PanelPicture = memo(ForecastPanel);
const DetailsPicture = memo(ForecastDetails);

function SentenceOnTop() {
  return <AnswerPicture {...useAnswer()} />;
}

function Answer() {
  return <PanelPicture {...useAnswer()} isSentenceElsewhere />;
}

function useAnswer(): ForecastAnswerProps {
  const { forecast, scenario, problems, isComputing } = useForecastOnPage();
  const edited = useDeferredValue(useEditorState((state) => state.document));
  return { scenario: scenario ?? edited, forecast, problems, isComputing };
}

function Details() {
  const { forecast, scenario } = useForecastInPictures();
  if (!forecast || !scenario) return null;
  return (
    <div className="mt-12">
      <DetailsPicture scenario={scenario} forecast={forecast} />
    </div>
  );
}
