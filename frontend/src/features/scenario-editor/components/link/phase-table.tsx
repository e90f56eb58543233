import type { ExchangePhase, ExchangePlan } from '#common/engine/link/exchange-plan.types.ts';
import { hasAlternatives } from '#frontend/features/scenario-editor/model/link/exchange-picture.ts';
import { phaseTime } from '#frontend/features/scenario-editor/model/link/figure-words.ts';
import { ROLES } from '#frontend/features/scenario-editor/model/words.ts';
import { patternOfRole } from '#frontend/lib/activity-patterns.ts';
import { OriginNote } from './origin-note.tsx';
import { ROLE_TINTS } from './role-tints.ts';

interface Props {
  plan: ExchangePlan;
  selected: number | null;
  onSelect: (phase: number | null) => void;
}

/** The same phases as numbers, in the same order; each opens how it comes about. */
export function PhaseTable({ plan, selected, onSelect }: Props) {
  return (
    <>
      <table aria-label="Phases of the exchange" className="mt-3 w-full text-left text-small tabular-nums">
        <thead>
          <tr className="border-b border-line">
            <th scope="col" className="py-1.5 pr-3 font-bold">
              Phase
            </th>
            <th scope="col" className="py-1.5 pr-3 font-bold max-sm:hidden">
              Radio
            </th>
            <th scope="col" className="py-1.5 pr-3 text-right font-bold">
              On average
            </th>
            <th scope="col" className="py-1.5 pr-3 text-right font-bold">
              At worst
            </th>
            <th scope="col" className="py-1.5 text-right font-bold max-sm:hidden">
              At once
            </th>
          </tr>
        </thead>
        <tbody>
          {plan.phases.map((phase, index) => (
            <PhaseLines
              key={phase.id}
              phase={phase}
              index={index}
              isOpen={index === selected}
              onToggle={() => onSelect(index === selected ? null : index)}
            />
          ))}
          <tr className="font-bold">
            <th scope="row" className="py-1.5 pr-3 text-left font-bold">
              In all
            </th>
            <td className="max-sm:hidden" />
            <td className="py-1.5 pr-3 text-right">{phaseTime(plan.meanS)}</td>
            <td className="py-1.5 pr-3 text-right">{phaseTime(plan.worstS)}</td>
            <td className="max-sm:hidden" />
          </tr>
        </tbody>
      </table>
      <p className="mt-1 min-h-5 text-small text-muted">
        {hasAlternatives(plan) &&
          'At worst not all phases come in the same exchange, so they add up to more than the whole.'}
      </p>
    </>
  );
}

interface LinesProps {
  phase: ExchangePhase;
  index: number;
  isOpen: boolean;
  onToggle: () => void;
}

function PhaseLines({ phase, index, isOpen, onToggle }: LinesProps) {
  const { name, role, meanS, worstS, longestS } = phase;
  return (
    <>
      <tr className={isOpen ? 'bg-accent-soft' : 'border-b border-hair'}>
        <th scope="row" className="py-0 pr-3 text-left font-normal">
          <button
            type="button"
            aria-expanded={isOpen}
            title="How it comes about"
            onClick={onToggle}
            className="flex min-h-9 w-full items-center gap-2.5 text-left hover:text-accent"
          >
            <span className="w-4 shrink-0 text-right">{index + 1}</span>
            <span
              aria-hidden="true"
              className={`h-4 w-5 shrink-0 border-b border-ink/70 ${ROLE_TINTS[role]}`}
              style={patternOfRole(role)}
            />
            <span className="underline decoration-dotted underline-offset-4">{name}</span>
          </button>
        </th>
        <td className="pr-3 text-muted max-sm:hidden">{ROLES.find(({ value }) => value === role)?.label}</td>
        <td className="pr-3 text-right whitespace-nowrap">{phaseTime(meanS)}</td>
        <td className="pr-3 text-right whitespace-nowrap">{phaseTime(worstS)}</td>
        <td className="text-right whitespace-nowrap text-muted max-sm:hidden">{phaseTime(longestS)}</td>
      </tr>
      {isOpen && (
        <tr className="border-b border-hair bg-accent-soft">
          <td colSpan={5} className="pt-0.5 pr-3 pb-2.5 pl-[3.25rem]">
            <p className="text-muted sm:hidden">
              radio in {role}, at once {phaseTime(longestS)}
            </p>
            <OriginNote formula={phase.formula} source={phase.source} />
          </td>
        </tr>
      )}
    </>
  );
}
