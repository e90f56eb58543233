import type { Part, Scenario } from '#common/engine/scenario/scenario.types.ts';
import { splitPath, type InputProblem } from '#common/schemas/problem.ts';

/**
 * The engine's message with names in the place of ids: it knows parts and states by their ids, a reader by their names.
 * States are looked up in the part that the path leads to.
 */
export function problemWords({ node }: Scenario, { path, message }: InputProblem): string {
  const part = partOf(node.parts, splitPath(path));
  const names = new Map([
    ...node.parts.map(({ id, name }): [string, string] => [id, name]),
    ...(part?.states ?? []).map(({ id, name }): [string, string] => [id, name]),
  ]);
  const named = message.replace(/"([^"]+)"/g, (_, text: string) => `“${names.get(text) ?? text}”`);
  return named.replace(/(reachable: )([\w, -]+)/, (_, start: string, ids: string) => {
    const words = ids.split(', ').map((id) => names.get(id) ?? id);
    return start + words.join(', ');
  });
}

function partOf(parts: readonly Part[], path: readonly (string | number)[]): Part | undefined {
  const [, list, key] = path;
  if (list === 'parts' && typeof key === 'number') return parts[key];
  const at = path.lastIndexOf('states');
  return at < 0 ? undefined : parts.find(({ id }) => id === path[at + 1]);
}
