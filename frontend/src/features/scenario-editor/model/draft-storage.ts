import { z } from 'zod';
import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import { scenarioSchema } from '#common/schemas/scenario.schema.ts';
import type { PendingText } from './editor-state.ts';

/** Unsaved work of one scenario as it lies in the browser. */
export interface Draft {
  /** Version of the stored scenario that the work stands on. */
  baseVersion: number;
  baseRevision: number;
  baseDocument: Scenario;
  document: Scenario;
  pending: Record<string, PendingText>;
  /** When it was written, ISO 8601. */
  writtenAt: string;
}

const draftSchema = z.strictObject({
  baseVersion: z.int(),
  baseRevision: z.int(),
  baseDocument: scenarioSchema,
  document: scenarioSchema,
  pending: z.record(z.string(), z.strictObject({ text: z.string(), message: z.string() })),
  writtenAt: z.iso.datetime(),
}) satisfies z.ZodType<Draft>;

type DraftStorage = Pick<Storage, 'getItem' | 'setItem' | 'removeItem'>;

/** Whose work on what: two people who use one browser never see each other's. */
export interface DraftKey {
  userId: string;
  scenarioId: string;
}

const keyOf = ({ userId, scenarioId }: DraftKey): string => `overwinter.draft.${userId}.${scenarioId}`;

/** The kept work, or null where there is none or it cannot be read. */
export function readDraft(storage: DraftStorage, key: DraftKey): Draft | null {
  try {
    const text = storage.getItem(keyOf(key));
    if (text === null) return null;
    const parsed = draftSchema.safeParse(JSON.parse(text));
    return parsed.success ? parsed.data : null;
  } catch {
    // Storage may be switched off, and what lies there may be anything.
    return null;
  }
}

/** Keeps the work; false where the browser has no room or no storage. */
export function writeDraft(storage: DraftStorage, key: DraftKey, draft: Draft): boolean {
  try {
    storage.setItem(keyOf(key), JSON.stringify(draft));
    return true;
  } catch {
    return false;
  }
}

export function removeDraft(storage: DraftStorage, key: DraftKey): void {
  try {
    storage.removeItem(keyOf(key));
  } catch {
    // Without storage there is no draft to remove.
  }
}
