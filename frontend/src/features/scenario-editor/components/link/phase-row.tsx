import type { ExchangePhase } from '#common/engine/link/exchange-plan.types.ts';
import { formatDuration } from '#common/units/format-duration.ts';
import {
  leaders,
  rulerTicks,
  type Leader,
  type PictureRow,
} from '#frontend/features/scenario-editor/model/link/exchange-picture.ts';
import { phaseTime } from '#frontend/features/scenario-editor/model/link/figure-words.ts';
import { patternOfRole } from '#frontend/lib/activity-patterns.ts';
import { ROLE_TINTS } from './role-tints.ts';

interface Props {
  row: PictureRow;
  phases: readonly ExchangePhase[];
  selected: number | null;
  onSelect: (phase: number) => void;
  /** Where the mean ends on this row's scale, as a share. */
  meanAt?: number;
}

const percent = (share: number): string => `${(share * 100).toFixed(3)}%`;

/** One row of time: numbers with leaders to their stretches, the stretches to scale, a ruler. */
export function PhaseRow({ row, phases, selected, onSelect, meanAt }: Props) {
  return (
    <div className="relative">
      <Leaders leaders={leaders(row)} selected={selected} />
      <div className="relative h-10 border-b border-ink/70">
        {row.stretches.map(({ phase, from, to, attempt, durationS }) => {
          const role = phases[phase]?.role ?? 'idle';
          return (
            <div
              key={`${phase} ${attempt ?? ''}`}
              title={phases[phase]?.name}
              onClick={() => onSelect(phase)}
              className={`@container absolute bottom-0 h-9 min-w-[3px] cursor-pointer border-l border-paper ${ROLE_TINTS[role]} ${phase === selected ? 'outline-2 outline-offset-1 outline-accent' : ''}`}
              style={{ left: percent(from), width: percent(to - from), zIndex: zOf(to - from), ...patternOfRole(role) }}
            >
              <span className="hidden flex-col pt-1 pl-1.5 text-[0.6875rem] leading-[0.9375rem] @min-[3.25rem]:flex">
                <span className="truncate">{phases[phase]?.name}</span>
                <span className="truncate tabular-nums">{phaseTime(durationS)}</span>
              </span>
            </div>
          );
        })}
      </div>
      <Ruler row={row} {...(meanAt === undefined ? {} : { meanAt })} />
      {row.attempts.length > 0 && <Attempts row={row} />}
    </div>
  );
}

/** What is short lies over what is long, so that it stays to be seen. */
const zOf = (share: number): number => Math.max(1, Math.round(20 - share * 20));

function Leaders({ leaders: placed, selected }: { leaders: readonly Leader[]; selected: number | null }) {
  return (
    <div className="relative h-9">
      <svg
        className="absolute inset-x-0 bottom-0 h-4 w-full text-line"
        viewBox="0 0 1000 16"
        preserveAspectRatio="none"
      >
        {placed.map(({ stretch, label }) => (
          <polyline
            key={stretch.phase}
            points={`${label * 1000},0 ${label * 1000},3 ${((stretch.from + stretch.to) / 2) * 1000},13 ${((stretch.from + stretch.to) / 2) * 1000},16`}
            fill="none"
            stroke="currentColor"
            strokeWidth="1"
            vectorEffect="non-scaling-stroke"
          />
        ))}
      </svg>
      {placed.map(({ stretch, label }) => (
        <span
          key={stretch.phase}
          className={`absolute top-0 w-6 -translate-x-1/2 text-center text-[0.75rem] leading-5 tabular-nums ${stretch.phase === selected ? 'font-extrabold text-accent' : ''}`}
          style={{ left: percent(label) }}
        >
          {stretch.phase + 1}
        </span>
      ))}
    </div>
  );
}

function Ruler({ row, meanAt }: { row: PictureRow; meanAt?: number }) {
  return (
    <div className="relative h-6 text-[0.6875rem] text-muted tabular-nums">
      {meanAt !== undefined && (
        <span
          className="absolute top-0 left-0 h-1 border-x border-b-2 border-accent"
          style={{ width: percent(meanAt) }}
        />
      )}
      {rulerTicks(row.totalS).map(({ timeS, at }) => (
        <span key={timeS} className="absolute top-0 h-1.5 border-l border-line" style={{ left: percent(at) }}>
          <span
            className={`absolute top-1.5 whitespace-nowrap ${at < 0.02 ? '' : at > 0.94 ? '-translate-x-full' : '-translate-x-1/2'}`}
          >
            {formatDuration(timeS)}
          </span>
        </span>
      ))}
    </div>
  );
}

function Attempts({ row }: { row: PictureRow }) {
  return (
    <div className="relative mt-1 h-6 text-[0.6875rem] text-muted">
      {row.attempts.map(({ from, to }, index) => (
        <span
          key={from}
          className="absolute top-0 h-1.5 border-x border-t border-line"
          style={{ left: `calc(${percent(from)} + 1px)`, width: `calc(${percent(to - from)} - 2px)` }}
        >
          <span className="absolute top-1.5 left-1/2 -translate-x-1/2 whitespace-nowrap">
            <span className={row.attempts.length > 4 ? 'max-sm:hidden' : ''}>{index === 0 ? 'attempt ' : ''}</span>
            {index + 1}
          </span>
        </span>
      ))}
    </div>
  );
}
