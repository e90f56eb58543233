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
      className={`@container absolute bottom-1.5 h-10 overflow-hidden border-b-2 border-ink/70 ${TINT_CLASS[block.tint]}`}
      style={{
        left: `calc(${percent(block.from)} + 1px)`,
        width: `calc(${percent(block.to - block.from)} - 2px)`,
        ...patternOf(block),
      }}
      title={`${block.name}, ${current}`}
    >
      <span className="hidden flex-col overflow-hidden pt-1 pl-[0.1875rem] text-[0.6875rem] leading-[0.9375rem] whitespace-nowrap @min-[1.9rem]:flex">
        <span>{block.name}</span>
        <span className="tabular-nums">{current}</span>
      </span>
    </div>
  );
}
