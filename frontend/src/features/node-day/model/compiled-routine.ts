import { compileNode } from '#common/engine/index.ts';
import type { NodeProgram, PartProgram, Routine, RoutineProgram, Scenario } from '#common/engine/index.ts';
import { EngineError } from '#common/errors.ts';
import { problemsOfEngine } from '#common/schemas/problem.ts';

export interface LaneProblem {
  /** Part in whose lane the problem belongs, null for the whole routine. */
  partId: string | null;
  stepIndex: number | null;
  message: string;
}

/** A routine laid out by the engine, or what keeps it from being laid out. */
export type CompiledRoutine =
  { kind: 'laid-out'; routine: RoutineProgram; parts: PartProgram[] } | { kind: 'problems'; problems: LaneProblem[] };

/** Compiles one routine of a node by itself, so that problems of other routines do not hide it. Disabled ones as well. */
export function compileAlone(scenario: Scenario, routine: Routine): CompiledRoutine {
  try {
    const program = compile(scenario, [{ ...routine, enabled: true }]);
    const [only] = program.routines;
    return only ? { kind: 'laid-out', routine: only, parts: program.parts } : { kind: 'problems', problems: [] };
  } catch (error) {
    if (!(error instanceof EngineError)) throw error;
    const problems = problemsOfEngine(error).map(({ path, message }) => laneProblem(scenario, path, message));
    return { kind: 'problems', problems };
  }
}

function compile(scenario: Scenario, routines: Routine[]): NodeProgram {
  const { regulator } = scenario.supply;
  const defaultReferenceVoltageV = regulator.kind === 'none' ? 3 : regulator.outputV;
  return compileNode({ ...scenario.node, routines }, { defaultReferenceVoltageV });
}

function laneProblem(scenario: Scenario, path: string, message: string): LaneProblem {
  const step = /\.steps\[(\d+)\]/.exec(path)?.[1];
  const named = /\.states\.([A-Za-z0-9_-]+)/.exec(path)?.[1];
  const listed = /node\.parts\[(\d+)\]/.exec(path)?.[1];
  const byIndex = listed === undefined ? undefined : scenario.node.parts[Number(listed)]?.id;
  const partId = scenario.node.parts.find((part) => part.id === named)?.id ?? byIndex ?? null;
  return {
    partId,
    stepIndex: step === undefined ? null : Number(step),
    message: withStateNames(scenario, partId, message),
  };
}

/** The engine tells states by id; people know them by name. */
function withStateNames(scenario: Scenario, partId: string | null, message: string): string {
  const states = scenario.node.parts.find((part) => part.id === partId)?.states ?? [];
  return states.reduce(
    (text, { id, name }) => text.replaceAll(`"${id}"`, `“${name}”`).replace(reachable(id), `$1${name}`),
    message,
  );
}

function reachable(id: string): RegExp {
  return new RegExp(`((?:reachable: |, ))${id}(?=[,.])`);
}
