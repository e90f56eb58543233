import { formatCurrent } from '#common/units/format-quantity.ts';
import { TINT_BORDERS_A, type Block, type Tint } from '../model/lanes.ts';
import { patternOf } from '../model/patterns.ts';
import { TINT_CLASS } from './block-picture.tsx';

const TINTS: Tint[] = [1, 2, 3, 4, 5];
const PATTERNS: { label: string; block: Pick<Block, 'kind' | 'role'> }[] = [
  { label: 'on the way to a state', block: { kind: 'transition', role: null } },
  { label: 'listening', block: { kind: 'state', role: 'listen' } },
  { label: 'sending', block: { kind: 'state', role: 'transmit' } },
];

/** What tints and patterns of the lanes mean. */
export function TintLegend() {
  return (
    <ul className="text-muted mt-3 flex flex-wrap items-center gap-x-5 gap-y-1.5 text-[0.6875rem] sm:pl-32">
      <li className="flex items-center gap-2">
        <span className="flex" aria-hidden="true">
          {TINTS.map((tint) => (
            <span key={tint} className={`block h-3 w-5 ${TINT_CLASS[tint]}`} />
          ))}
        </span>
        under {formatCurrent(TINT_BORDERS_A[0])}, then tenfold steps, to over {formatCurrent(TINT_BORDERS_A[3])}
      </li>
      {PATTERNS.map(({ label, block }) => (
        <li key={label} className="flex items-center gap-2">
          <span className="bg-tint-2 text-on-tint-2 block h-3 w-5" style={patternOf(block)} aria-hidden="true" />
          {label}
        </li>
      ))}
      <li className="flex items-center gap-2">
        <span className="bg-line block h-px w-5" aria-hidden="true" />
        rest
      </li>
    </ul>
  );
}
