import { useState } from 'react';
import type { FrameLayout } from '#common/engine/link/exchange-plan.types.ts';
import { formatNumber } from '#common/units/format-quantity.ts';
import { phaseTime } from '#frontend/features/scenario-editor/model/link/figure-words.ts';
import {
  drawnFields,
  type DrawnField,
  type OctetUse,
} from '#frontend/features/scenario-editor/model/link/frame-picture.ts';
import { DOTTED, SLANTED, UPRIGHT, type Pattern } from '#frontend/lib/activity-patterns.ts';
import { OriginNote } from './origin-note.tsx';

const USES: Record<OctetUse, { className: string; pattern: Pattern }> = {
  synchronise: { className: 'bg-tint-1 text-on-tint-1', pattern: SLANTED },
  address: { className: 'bg-tint-2 text-on-tint-2', pattern: {} },
  secure: { className: 'bg-tint-2 text-on-tint-2', pattern: DOTTED },
  carry: { className: 'bg-tint-4 text-on-tint-4', pattern: {} },
  check: { className: 'bg-tint-3 text-on-tint-3', pattern: UPRIGHT },
};

/** The frame as it goes on air: a tick for each octet, in named fields. */
export function FrameOctets({ frame }: { frame: FrameLayout }) {
  const [selectedId, setSelectedId] = useState<string | null>(null);
  const fields = drawnFields(frame);
  const selected = fields.find(({ field }) => field.id === selectedId);
  return (
    <section aria-labelledby="frame-octets" className="mt-7">
      <h4 id="frame-octets" className="text-small font-extrabold">
        The frame on air
        <span className="ml-2.5 font-normal text-muted">a tick for each octet, which is a byte</span>
      </h4>
      <ul className="mt-2 flex flex-wrap items-end gap-x-1.5 gap-y-3">
        {fields.map((drawn) => (
          <li key={drawn.field.id} className="min-w-0">
            <FieldTicks
              drawn={drawn}
              isSelected={drawn === selected}
              onSelect={() => setSelectedId(drawn === selected ? null : drawn.field.id)}
            />
          </li>
        ))}
      </ul>
      <p className="mt-2 text-small text-muted">{frameWords(frame)}</p>
      {selected && (
        <div className="mt-2 border-l-2 border-accent pl-4" role="status">
          <p className="text-small">
            <strong className="font-extrabold">{selected.field.name}</strong>: {octets(selected.field.octets)},{' '}
            {placeWords(selected)}, {phaseTime(selected.field.airtimeS)} on air
          </p>
          <OriginNote formula={selected.field.formula} source={selected.field.source} />
        </div>
      )}
    </section>
  );
}

const octets = (count: number): string =>
  `${formatNumber(count, { significantDigits: 5 })} ${count === 1 ? 'octet' : 'octets'}`;
const placeWords = ({ first, last }: DrawnField): string =>
  first === last ? `place ${first}` : `places ${first} to ${last}`;

function frameWords({ psduOctets, airOctets, airtimeS, largestPayloadOctets }: FrameLayout): string {
  const largest = largestPayloadOctets === null ? '' : ` A payload of ${octets(largestPayloadOctets)} would just fit.`;
  return `${octets(airOctets)} on air, ${octets(psduOctets)} of them PSDU: ${phaseTime(airtimeS)}.${largest}`;
}

interface TicksProps {
  drawn: DrawnField;
  isSelected: boolean;
  onSelect: () => void;
}

function FieldTicks({ drawn, isSelected, onSelect }: TicksProps) {
  const { field, use, first, last } = drawn;
  const { className, pattern } = USES[use];
  return (
    <button
      type="button"
      aria-expanded={isSelected}
      onClick={onSelect}
      className={`block max-w-full text-left hover:text-accent ${isSelected ? 'text-accent' : ''}`}
    >
      <span className={`block text-[0.6875rem] leading-4 whitespace-nowrap ${isSelected ? 'font-extrabold' : ''}`}>
        {field.name}
        <span className="sr-only">{`: ${octets(field.octets)}, ${placeWords(drawn)}`}</span>
      </span>
      <span aria-hidden="true" className="flex flex-wrap gap-y-1">
        {Array.from({ length: drawn.drawn }, (_, index) => (
          <span
            key={index}
            className={`h-6 w-[0.5625rem] border-b border-l border-b-ink/70 border-l-paper ${className}`}
            style={pattern}
          />
        ))}
        {field.octets > drawn.drawn && (
          <span className="self-center pl-1.5 text-[0.6875rem]">and {octets(field.octets - drawn.drawn)} more</span>
        )}
      </span>
      <span aria-hidden="true" className="block text-[0.6875rem] leading-4 text-muted tabular-nums">
        {first === last ? first : `${first}–${last}`}
      </span>
    </button>
  );
}
