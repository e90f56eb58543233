import type { Part } from '#common/engine/scenario/scenario.types.ts';
import { useState } from 'react';

/**
 * The same list as long as names and states of its parts are the same: the currents in it change with each keystroke,
 * and what only names them need not render again.
 */
export function useShallowList(parts: Part[]): Part[] {
  const [kept, setKept] = useState(parts);
  if (kept === parts || isSameOutline(kept, parts)) return kept;
  setKept(parts);
  return parts;
}

function isSameOutline(a: readonly Part[], b: readonly Part[]): boolean {
  return (
    a.length === b.length &&
    a.every((part, index) => {
      const other = b[index];
      return (
        part === other ||
        (part.id === other?.id &&
          part.name === other.name &&
          part.states.length === other.states.length &&
          part.states.every((state, at) => state.id === other.states[at]?.id && state.name === other.states[at].name))
      );
    })
  );
}
