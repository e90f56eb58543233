import type { Part, Routine, Scenario } from '#common/engine/index.ts';
import type { LaneProblem } from '../model/compiled-routine.ts';

interface Props {
  scenario: Scenario;
  routine: Routine;
  problems: readonly LaneProblem[];
  selectedStepId: string | null;
  onSelectStep: (stepId: string) => void;
}

/** A routine that cannot be laid out: its steps as asked for, each problem in the lane of its part. No times, for there are none. */
export function ProblemLanes({ scenario, routine, problems, selectedStepId, onSelectStep }: Props) {
  const { parts } = scenario.node;
  const isPlaced = ({ partId }: LaneProblem): boolean => parts.some((part) => part.id === partId);
  const others = problems.filter((problem) => !isPlaced(problem));
  return (
    <div className="mt-2">
      <div className="overflow-x-auto" role="group" aria-label="Steps of the routine" tabIndex={0}>
        <table
          className="w-full table-fixed border-collapse text-left"
          style={{ minWidth: `${8 + routine.steps.length * 6}rem` }}
        >
          <thead>
            <tr className="align-bottom">
              <th className="w-32 pr-3 pb-2">
                <span className="sr-only">Part</span>
              </th>
              {routine.steps.map((step) => (
                <th key={step.id} className="border-hair border-l pb-2 pl-1.5 font-normal">
                  <button
                    type="button"
                    aria-pressed={step.id === selectedStepId}
                    className={`text-[0.6875rem] hover:text-accent text-left ${step.id === selectedStepId ? 'font-extrabold' : 'font-semibold'}`}
                    onClick={() => onSelectStep(step.id)}
                  >
                    {step.name}
                  </button>
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {parts.map((part) => (
              <LaneOfPart
                key={part.id}
                part={part}
                routine={routine}
                problems={problems.filter(({ partId }) => partId === part.id)}
              />
            ))}
          </tbody>
        </table>
      </div>
      {others.length > 0 && <Messages problems={others} />}
    </div>
  );
}

function LaneOfPart({ part, routine, problems }: { part: Part; routine: Routine; problems: LaneProblem[] }) {
  return (
    <>
      <tr className="align-top">
        <th scope="row" className="text-small pt-3 pr-3 font-semibold">
          {part.name}
        </th>
        {routine.steps.map((step, i) => {
          const state = part.states.find(({ id }) => id === step.states[part.id]);
          const isWrong = problems.some(({ stepIndex }) => stepIndex === i);
          return (
            <td key={step.id} className="border-hair border-l pt-3 pr-0.5 pl-px text-[0.6875rem]">
              {(state ?? isWrong) && (
                <span
                  className={`block truncate px-1 py-1.5 ${isWrong ? 'border-rust text-rust border-2 border-dashed font-bold' : 'bg-tint-2 text-on-tint-2'}`}
                >
                  {state?.name ?? 'return to rest'}
                </span>
              )}
            </td>
          );
        })}
      </tr>
      <tr>
        <td />
        <td colSpan={Math.max(1, routine.steps.length)} className="border-line border-t">
          {problems.length > 0 && <Messages problems={problems} />}
        </td>
      </tr>
    </>
  );
}

function Messages({ problems }: { problems: readonly LaneProblem[] }) {
  return (
    <ul className="text-small space-y-1 py-2">
      {problems.map(({ message, stepIndex }) => (
        <li key={`${stepIndex ?? ''} ${message}`} className="border-rust border-l-2 pl-3">
          {stepIndex === null ? '' : `Step ${stepIndex + 1}: `}
          {message}
        </li>
      ))}
    </ul>
  );
}
