import { formatNumber, NO_BREAK_SPACE } from '#common/units/format-quantity.ts';
import { HEADROOM_BORDERS_V, type HeadroomStep } from '../model/ribbon.ts';
import { HEADROOM_FILL } from './ribbon-row.tsx';

const STEPS: HeadroomStep[] = [1, 2, 3, 4, 5];
const SWATCH_PX = 25;

/** Tints with their borders in volts, and the marks. */
export function RibbonLegend({ patternId, hasEnd }: { patternId: string; hasEnd: boolean }) {
  return (
    <div className="text-muted mt-2 flex flex-wrap items-start gap-x-4 gap-y-2 text-[0.6875rem] leading-none">
      <div className="flex gap-1.5">
        headroom, V
        <svg width={SWATCH_PX * 5} height="25" role="img" aria-label={legendWords()}>
          {STEPS.map((step, i) => (
            <g key={step}>
              <rect x={i * SWATCH_PX} width={SWATCH_PX} height="10" className={HEADROOM_FILL[step]} />
              {step >= 4 && (
                <rect x={i * SWATCH_PX} width={SWATCH_PX} height="10" fill={`url(#${patternId}-${step})`} />
              )}
            </g>
          ))}
          <rect x="0.5" y="0.5" width={SWATCH_PX * 5 - 1} height="9.5" className="stroke-ink fill-none" />
          {HEADROOM_BORDERS_V.map((border, i) => (
            <text
              key={border}
              x={(i + 1) * SWATCH_PX}
              y="22"
              textAnchor="middle"
              fontSize="10.5"
              className="fill-muted"
            >
              {formatNumber(border)}
            </text>
          ))}
        </svg>
      </div>
      <ul className="flex flex-wrap gap-x-4 gap-y-2">
        <Mark label={`below 0${NO_BREAK_SPACE}°C`}>
          <rect y="2" width="20" height="5" fill={`url(#${patternId}-cold)`} />
        </Mark>
        <Mark label="warning">
          <circle cx="10" cy="5" r="3.5" className="fill-paper stroke-ink" strokeWidth="1.75" />
        </Mark>
        {hasEnd && (
          <Mark label="end">
            <line x1="10" x2="10" y2="10" className="stroke-ink" strokeWidth="3.5" />
          </Mark>
        )}
      </ul>
    </div>
  );
}

function Mark({ label, children }: { label: string; children: React.ReactNode }) {
  return (
    <li className="flex items-center gap-1.5">
      <svg width="20" height="10" aria-hidden="true" focusable="false">
        {children}
      </svg>
      {label}
    </li>
  );
}

function legendWords(): string {
  const [first, second, third, fourth] = HEADROOM_BORDERS_V;
  return `Tints of headroom, from ample to nearly gone: ${first} V and more, ${second} to ${first} V, ${third} to ${second} V, ${fourth} to ${third} V, under ${fourth} V`;
}
