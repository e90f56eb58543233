import { useQueryClient, type QueryClient } from '@tanstack/react-query';
import { useCallback, useEffect, useRef, useState } from 'react';
import { scenarioDetailSchema, type ScenarioDetail } from '#common/schemas/api/scenarios.ts';
import type { InputProblem } from '#common/schemas/problem.ts';
import { ApiError } from '#frontend/lib/api-client.ts';
import { wordsOfError } from '#frontend/lib/form-errors.ts';
import { isServerReachable, subscribeToReachability } from '#frontend/lib/reachability.ts';
import { REVISIONS_KEY } from '../api/revisions.ts';
import { saveScenario, scenarioQuery } from '../api/scenario.ts';
import { isDirty, unsettledFields } from '../model/editor-state.ts';
import type { EditorStore } from '../model/editor-store.ts';
import { savedOf } from '../model/opening.ts';

export type SaveStatus =
  | { kind: 'idle' }
  | { kind: 'saving' }
  /** The server was not reached; the save is tried again by itself. */
  | { kind: 'offline' }
  /** Some field holds text that is no value yet. */
  | { kind: 'unsettled'; count: number }
  | { kind: 'failed'; message: string; problems: InputProblem[] }
  | { kind: 'conflict'; theirs: ScenarioDetail };

export interface Saving {
  status: SaveStatus;
  save: (note?: string) => void;
  /** Saves on top of the other's revision. */
  keepMine: () => void;
  /** Goes on from the other's revision; what was here can be brought back by undo. */
  takeTheirs: () => void;
  dismiss: () => void;
}

const RETRY_MS = 8_000;

/** Saves the document as a new revision, and what to do when that does not go through. */
export function useSave(store: EditorStore, scenarioId: string): Saving {
  const client = useQueryClient();
  const [status, setStatus] = useState<SaveStatus>({ kind: 'idle' });
  const note = useRef('');
  const isUnderWay = useRef(false);

  const send = useCallback(
    async (version: number): Promise<void> => {
      if (isUnderWay.current) return;
      isUnderWay.current = true;
      setStatus((before) => (before.kind === 'offline' ? before : { kind: 'saving' }));
      const { document } = store.getState();
      try {
        const detail = await saveScenario(scenarioId, { version, document, note: note.current });
        // The stored document is the one sent, apart from key order.
        store.markSaved({ ...savedOf(detail), document });
        note.current = '';
        showSaved(client, detail);
        setStatus({ kind: 'idle' });
      } catch (error) {
        setStatus(statusOf(error));
      } finally {
        isUnderWay.current = false;
      }
    },
    [client, scenarioId, store],
  );

  const save = useCallback(
    (text = '') => {
      const state = store.getState();
      const unsettled = unsettledFields(state);
      if (unsettled[0] !== undefined) {
        setStatus({ kind: 'unsettled', count: unsettled.length });
        store.focusField(unsettled[0]);
        return;
      }
      if (!isDirty(state) && text === '') return;
      if (text !== '') note.current = text;
      void send(state.saved.version);
    },
    [send, store],
  );

  useRetry(status.kind === 'offline', () => void send(store.getState().saved.version));

  const theirs = status.kind === 'conflict' ? status.theirs : null;
  return {
    status,
    save,
    keepMine: () => {
      if (!theirs) return;
      store.rebase(savedOf(theirs));
      void send(theirs.version);
    },
    takeTheirs: () => {
      if (!theirs) return;
      store.rebase(savedOf(theirs));
      store.replaceDocument(theirs.document, `take over revision ${theirs.revision}`);
      setStatus({ kind: 'idle' });
    },
    dismiss: () => setStatus({ kind: 'idle' }),
  };
}

function showSaved(client: QueryClient, detail: ScenarioDetail): void {
  client.setQueryData(scenarioQuery(detail.id).queryKey, detail);
  void client.invalidateQueries({ queryKey: [REVISIONS_KEY, detail.id, 'list'] });
  void client.invalidateQueries({ queryKey: ['scenarios', 'list'] });
}

function statusOf(error: unknown): SaveStatus {
  if (!(error instanceof ApiError)) return { kind: 'failed', message: wordsOfError(error), problems: [] };
  if (error.isOffline) return { kind: 'offline' };
  if (error.status === 409) {
    const theirs = scenarioDetailSchema.safeParse(error.problem?.current);
    if (theirs.success) return { kind: 'conflict', theirs: theirs.data };
  }
  const problems = (error.problem?.errors ?? []).map(({ path, message }) => ({
    path: path.replace(/^document\./, ''),
    message,
  }));
  return { kind: 'failed', message: wordsOfError(error), problems };
}

/** Tries again when the browser is online or another request has come through, and now and then besides. */
function useRetry(isOn: boolean, retry: () => void): void {
  const latest = useRef(retry);
  useEffect(() => {
    latest.current = retry;
  });
  useEffect(() => {
    if (!isOn) return undefined;
    const attempt = (): void => latest.current();
    const timer = setInterval(attempt, RETRY_MS);
    const unsubscribe = subscribeToReachability(() => {
      if (isServerReachable()) attempt();
    });
    window.addEventListener('online', attempt);
    return () => {
      clearInterval(timer);
      unsubscribe();
      window.removeEventListener('online', attempt);
    };
  }, [isOn]);
}
