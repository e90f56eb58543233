import { useMemo, type MouseEvent } from 'react';
import type { Scenario } from '#common/engine/index.ts';
import { formatCurrent } from '#common/units/format-quantity.ts';
import type { CompiledRoutine } from '../model/compiled-routine.ts';
import { cyclePicture, type CyclePicture, type Lane } from '../model/lanes.ts';
import { BlockPicture } from './block-picture.tsx';
import { CycleTable } from './cycle-table.tsx';
import { percent, StepHeader } from './step-header.tsx';
import { TintLegend } from './tint-legend.tsx';

interface Props {
  scenario: Scenario;
  compiled: Extract<CompiledRoutine, { kind: 'laid-out' }>;
  selectedStepId: string | null;
  onSelectStep: (stepId: string) => void;
}

/** Narrower than this, currents no longer fit into their blocks; then the picture scrolls. */
const LEAST_PX = 560;
const PX_PER_WEIGHT = 24;

/** One cycle: names and durations on top, below a lane for each part at one height. */
export function CycleLanes({ scenario, compiled, selectedStepId, onSelectStep }: Props) {
  const picture = useMemo(() => cyclePicture(scenario, compiled.routine, compiled.parts), [scenario, compiled]);
  const handleClick = (event: MouseEvent<HTMLElement>): void => {
    const box = event.currentTarget.getBoundingClientRect();
    const at = (event.clientX - box.left) / box.width;
    const step = picture.steps.find(({ from, to, stepId }) => stepId !== null && at >= from && at < to);
    if (step?.stepId) onSelectStep(step.stepId);
  };
  return (
    <div className="mt-2">
      <div className="grid sm:grid-cols-[8rem_minmax(0,1fr)]">
        <div className="pt-11 max-sm:hidden" aria-hidden="true">
          {picture.lanes.map((lane) => (
            <LaneName key={lane.partId} lane={lane} />
          ))}
        </div>
        <div className="min-w-0 overflow-x-auto pb-1" role="group" aria-label="One cycle" tabIndex={-1}>
          <div style={{ minWidth: Math.max(LEAST_PX, picture.weight * PX_PER_WEIGHT) }}>
            <StepHeader steps={picture.steps} selectedStepId={selectedStepId} onSelectStep={onSelectStep} />
            {/* The buttons above do the same for the keyboard, the table below says the same. */}
            <div className="relative cursor-pointer" aria-hidden="true" onClick={handleClick}>
              <Guides picture={picture} selectedStepId={selectedStepId} />
              {picture.lanes.map((lane) => (
                <LaneRow key={lane.partId} lane={lane} />
              ))}
            </div>
          </div>
        </div>
      </div>
      <TintLegend />
      <CycleTable scenario={scenario} compiled={compiled} />
    </div>
  );
}

function LaneName({ lane }: { lane: Lane }) {
  return (
    <div className="flex h-16 flex-col justify-end pr-3 pb-1.5 text-small leading-tight">
      <span className="line-clamp-2 font-semibold">{lane.name}</span>
      <span className="text-muted truncate text-[0.6875rem] tabular-nums">
        {formatCurrent(lane.restCurrentA)} {lane.restName}
      </span>
    </div>
  );
}

function Guides({ picture, selectedStepId }: { picture: CyclePicture; selectedStepId: string | null }) {
  const selected = picture.steps.find((step) => step.stepId !== null && step.stepId === selectedStepId);
  return (
    <>
      {selected && (
        <div
          className="bg-accent-soft absolute inset-y-0"
          style={{ left: percent(selected.from), width: percent(selected.to - selected.from) }}
        />
      )}
      {picture.steps.map((step) => (
        <div
          key={`${step.kind} ${step.from}`}
          className="border-hair absolute -top-11 bottom-0 border-l"
          style={{ left: percent(step.from) }}
        />
      ))}
    </>
  );
}

function LaneRow({ lane }: { lane: Lane }) {
  return (
    <div className="relative h-[4.5rem] sm:h-16">
      <span className="text-small sticky left-0 inline-block pt-0.5 text-[0.6875rem] font-semibold sm:hidden">
        {lane.name}
      </span>
      {/* Rest: a thin line through the whole lane, on which the blocks stand. */}
      <div className="bg-line absolute inset-x-0 bottom-1.5 h-px" />
      {lane.blocks.map((block) => (
        <BlockPicture key={block.from} block={block} />
      ))}
    </div>
  );
}
