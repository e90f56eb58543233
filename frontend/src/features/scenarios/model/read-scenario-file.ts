import { scenarioFileSchema, type ScenarioFile } from '#common/schemas/api/scenarios.ts';
import { LIMITS } from '#common/schemas/limits.ts';
import { problemsOfZod, type InputProblem } from '#common/schemas/problem.ts';

export type ReadFile =
  { kind: 'file'; file: ScenarioFile } | { kind: 'unusable'; reason: string; problems: InputProblem[] };

const SHOWN = 5;

/** Reads an exported scenario; what is wrong with it is told before anything is sent. */
export function readScenarioFile(text: string): ReadFile {
  if (new Blob([text]).size > LIMITS.documentBytes) {
    return unusable(`The file is larger than ${LIMITS.documentBytes / 1024} KiB; no scenario is that large.`);
  }
  const json = jsonOf(text);
  if (json === undefined) return unusable('The file is not JSON. Choose one that was exported here.');
  const parsed = scenarioFileSchema.safeParse(json);
  if (parsed.success) return { kind: 'file', file: parsed.data };
  const problems = problemsOfZod(parsed.error);
  const more = problems.length > SHOWN ? ` The first ${SHOWN} of ${problems.length} places:` : '';
  return unusable(`The file is not a scenario of this version.${more}`, problems.slice(0, SHOWN));
}

function unusable(reason: string, problems: InputProblem[] = []): ReadFile {
  return { kind: 'unusable', reason, problems };
}

function jsonOf(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
}
