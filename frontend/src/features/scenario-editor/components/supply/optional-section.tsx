import type { ReactNode } from 'react';
import type { Supply } from '#common/engine/scenario/scenario.types.ts';
import { useEditorStore, useIsReadOnly } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import { updateSupply, withOptional } from '#frontend/features/scenario-editor/model/operations/supply-operations.ts';
import { Section } from '../node/section.tsx';

type OptionalKey = 'capacitor' | 'lowBattery' | 'harvest';
type Change<T> = (
  apply: (value: T) => T,
) => (document: Parameters<typeof updateSupply>[0]) => ReturnType<typeof updateSupply>;

/** Changes a piece of the supply where there is one. */
export function changeOf<K extends OptionalKey>(key: K): Change<NonNullable<Supply[K]>> {
  return (apply) => (document) =>
    updateSupply(document, (supply) => {
      const value = supply[key];
      return value === undefined ? supply : { ...supply, [key]: apply(value) };
    });
}

interface OptionalSectionProps {
  id: OptionalKey;
  title: string;
  note: string;
  /** What to begin with. */
  start: Pick<Supply, OptionalKey>;
  isThere: boolean;
  children: ReactNode;
}

/** A piece of the supply that may be absent. */
export function OptionalSection({ id, title, note, start, isThere, children }: OptionalSectionProps) {
  const store = useEditorStore();
  const isReadOnly = useIsReadOnly();
  const word = title.toLowerCase();
  return (
    <Section id={id} title={title} note={isThere ? note : `none; ${note}`}>
      {isThere && <div className="grid grid-cols-2 gap-x-6 sm:grid-cols-4">{children}</div>}
      {!isReadOnly && (
        <button
          type="button"
          className="link min-h-9 text-small"
          onClick={() =>
            store.edit({
              label: `${isThere ? 'remove' : 'add'} the ${word}`,
              change: (document) =>
                updateSupply(document, (supply) => withOptional(supply, id, isThere ? undefined : start[id])),
            })
          }
        >
          {isThere ? `Remove the ${word}` : `Add a ${word}`}
        </button>
      )}
    </Section>
  );
}
