import { memo, useDeferredValue, useMemo, useState } from 'react';
import type { Quantity } from '#common/engine/scenario/scenario.types.ts';
import type { Dimension } from '#common/units/dimensions.table.ts';
import { formatQuantity } from '#common/units/format-quantity.ts';
import { Button } from '#frontend/components/button.tsx';
import { QuantityInput } from '#frontend/components/quantity-input.tsx';
import {
  useEditorState,
  useEditorStore,
  useIsReadOnly,
} from '#frontend/features/scenario-editor/hooks/editor-context.tsx';
import {
  assumeMaxima,
  missingMaxima,
  type FigureKind,
  type MissingMaximum,
} from '#frontend/features/scenario-editor/model/quantities.ts';
import { useSettled } from '#frontend/features/scenario-editor/hooks/use-settled.ts';
import { Section } from './section.tsx';

const DIMENSION_OF: Record<FigureKind, Dimension> = {
  current: 'current',
  time: 'duration',
  voltage: 'voltage',
  resistance: 'resistance',
  charge: 'charge',
  capacitance: 'capacitance',
  'yearly loss': 'loss-per-year',
};

const SHOWN_AT_FIRST = 6;

/** Figures of which nobody has said how bad they can get, with a way to assume it. */
export function MaximaSection() {
  const document = useDeferredValue(useEditorState((state) => state.document));
  const missing = useMemo(() => missingMaxima(document), [document]);
  return <MissingMaxima missing={useSettled(missing)} />;
}

const MissingMaxima = memo(function MissingMaxima({ missing }: { missing: readonly MissingMaximum[] }) {
  const store = useEditorStore();
  const isReadOnly = useIsReadOnly();
  const [factor, setFactor] = useState<number | undefined>(1.5);
  const [isAllShown, setAllShown] = useState(false);
  const times = factor ?? 1.5;
  const assume = (label: string, fields?: ReadonlySet<string>): void =>
    store.edit({ label, change: (before) => assumeMaxima(before, times, fields) });
  const shown = isAllShown ? missing : missing.slice(0, SHOWN_AT_FIRST);
  return (
    <Section
      id="maxima"
      title="Figures without a maximum"
      note={missing.length === 0 ? 'none' : `${missing.length}; currents, times, resistances and losses`}
    >
      {missing.length === 0 ? (
        <p className="text-muted">Every figure that could turn out worse says how much.</p>
      ) : (
        <>
          <p className="text-muted">
            These figures have no maximum: a node with worse parts cannot be judged by them. An assumed maximum stays
            marked as assumed.
          </p>
          {!isReadOnly && (
            <div className="mt-3 flex flex-wrap items-end gap-x-6">
              <div className="w-32">
                <QuantityInput
                  label="Maximum = typical ×"
                  value={factor}
                  options={{ dimension: 'number', min: 1, max: 100 }}
                  onCommit={setFactor}
                />
              </div>
              <div className="pb-6">
                <Button onClick={() => assume('assume every missing maximum')}>
                  Assume it for all {missing.length}
                </Button>
              </div>
            </div>
          )}
          <ul className="border-t border-hair">
            {shown.map((figure) => (
              <MissingRow key={figure.site.field} figure={figure} times={times} assume={assume} />
            ))}
          </ul>
          {missing.length > SHOWN_AT_FIRST && (
            <button type="button" className="link mt-2 min-h-9" onClick={() => setAllShown(!isAllShown)}>
              {isAllShown ? 'Show fewer' : `Show all ${missing.length}`}
            </button>
          )}
        </>
      )}
    </Section>
  );
});

interface MissingRowProps {
  figure: MissingMaximum;
  times: number;
  assume: (label: string, fields: ReadonlySet<string>) => void;
}

function MissingRow({ figure: { site, quantity }, times, assume }: MissingRowProps) {
  const store = useEditorStore();
  const isReadOnly = useIsReadOnly();
  return (
    <li className="flex flex-wrap items-center justify-between gap-x-4 border-b border-hair py-1">
      <button
        type="button"
        className="min-w-0 text-left hover:underline hover:underline-offset-4"
        onClick={() => store.focusField(`${site.field}.max`)}
      >
        {site.label} <span className="text-muted">{amount(quantity, site.kind)}</span>
      </button>
      {!isReadOnly && (
        <button
          type="button"
          className="link min-h-9 text-small"
          onClick={() => assume(`assume the maximum of ${site.label}`, new Set([site.field]))}
        >
          max = {amount({ typical: quantity.typical * times }, site.kind)}, assumed
          <span className="sr-only"> for {site.label}</span>
        </button>
      )}
    </li>
  );
}

const amount = ({ typical }: Pick<Quantity, 'typical'>, kind: FigureKind): string =>
  formatQuantity(typical, DIMENSION_OF[kind]);
