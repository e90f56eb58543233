import { formatCurrent } from '#common/units/format-quantity.ts';
import type { Block, Tint } from '../model/lanes.ts';
import { patternOf } from '../model/patterns.ts';
import { percent } from './step-header.tsx';

export const TINT_CLASS: Record<Tint, string> = {
  1: 'bg-tint-1 text-on-tint-1',
  2: 'bg-tint-2 text-on-tint-2',
  3: 'bg-tint-3 text-on-tint-3',
  4: 'bg-tint-4 text-on-tint-4',
  5: 'bg-tint-5 text-on-tint-5',
};

/** A part in a state or on the way to one: tint by current, pattern by kind, both written where there is room. */
export function BlockPicture({ block }: { block: Block }) {
  const current = formatCurrent(block.currentA);
  return (
    <div
      className={`absolute bottom-1.5 h-10 overflow-hidden border-b-2 border-ink/70 ${TINT_CLASS[block.tint]}`}
      style={{
        left: `calc(${percent(block.from)} + 1px)`,
        width: `calc(${percent(block.to - block.from)} - 2px)`,
        ...patternOf(block),
      }}
      title={`${block.name}, ${current}`}
    >
      <span className="block pt-1 text-[0.6875rem] leading-[0.9375rem] whitespace-nowrap">
        <Line text={block.name} />
        <Line text={current} />
      </span>
    </div>
  );
}

/** A line that is there whole or not at all: beside the narrow first item, a text without room wraps out of sight. */
function Line({ text }: { text: string }) {
  return (
    <span className="flex h-[0.9375rem] flex-wrap overflow-hidden">
      <span className="h-full w-[0.1875rem]" />
      <span className="tabular-nums">{text}</span>
    </span>
  );
}
