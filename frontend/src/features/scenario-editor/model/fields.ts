import { joinPath, splitPath } from '#common/schemas/problem.ts';
import type { Scenario } from '#common/engine/scenario/scenario.types.ts';

/**
 * A field key names an input of the page: the path into the document with dots, list items by id where they have one.
 * `node.parts[0].states[2].current` is `node.parts.radio.states.transmit.current`. Unlike a path it survives reordering.
 */
export function fieldOfPath(scenario: Scenario, path: string): string {
  let value: unknown = scenario;
  const keys = splitPath(path).map((segment) => {
    const next: unknown = typeof value === 'object' && value !== null ? Reflect.get(value, segment) : undefined;
    value = next;
    return typeof segment === 'number' ? (idOf(next) ?? String(segment)) : segment;
  });
  return keys.join('.');
}

/** The path of a field key; segments that are no longer there are kept as they are. */
export function pathOfField(scenario: Scenario, field: string): string {
  let value: unknown = scenario;
  const segments = field.split('.').map((key): string | number => {
    const segment = Array.isArray(value) ? indexOf(value, key) : key;
    value = typeof value === 'object' && value !== null ? Reflect.get(value, segment) : undefined;
    return segment;
  });
  return joinPath(segments);
}

/** Whether the thing that a field belongs to is there; the figure itself may be optional, and so may the object it is in. */
export function isFieldOf(scenario: Scenario, field: string): boolean {
  let value: unknown = scenario;
  for (const key of field.split('.').slice(0, -2)) {
    const segment = Array.isArray(value) ? indexOf(value, key) : key;
    value = typeof value === 'object' && value !== null ? Reflect.get(value, segment) : undefined;
    if (value === undefined) return false;
  }
  return true;
}

function indexOf(list: readonly unknown[], key: string): string | number {
  const byId = list.findIndex((item) => idOf(item) === key);
  if (byId >= 0) return byId;
  return /^\d+$/.test(key) ? Number(key) : key;
}

function idOf(value: unknown): string | null {
  if (typeof value !== 'object' || value === null || !('id' in value)) return null;
  return typeof value.id === 'string' ? value.id : null;
}

export type EditorTab = 'node' | 'supply' | 'climate' | 'target';

/** The page that a field is on; null for the name of the scenario, which is on each. */
export function tabOfField(field: string): EditorTab | null {
  const [first] = field.split('.');
  return first === 'node' || first === 'supply' || first === 'climate' || first === 'target' ? first : null;
}
