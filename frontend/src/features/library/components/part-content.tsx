import type { Part, State } from '#common/engine/scenario/scenario.types.ts';
import { DataTable, type Column } from '#frontend/components/data-table.tsx';
import { formatCurrent, formatQuantity, formatVoltage } from '#common/units/format-quantity.ts';
import { rangeOf } from '../model/figures.ts';
import { FigureRows } from './figure-tables.tsx';
import { ProvenanceNote } from './provenance-note.tsx';

const LAWS = {
  'constant-current': 'constant current',
  'constant-power': 'constant power',
  resistive: 'resistive',
};

export function PartContent({ part }: { part: Part }) {
  return (
    <>
      <h2 className="text-lead font-light">States</h2>
      <div className="mt-2">
        <DataTable caption="States" columns={stateColumns(part)} rows={part.states} rowKey={(state) => state.id} />
      </div>
      <Transitions part={part} />
      <div className="mt-12">
        <FigureRows
          caption="Supply"
          rows={[
            {
              label: 'Lowest voltage at which it works',
              value: formatVoltage(part.lowestVoltageV.typical),
              range: rangeOf(part.lowestVoltageV, 'voltage'),
              provenance: part.lowestVoltageV.provenance ?? { kind: 'assumed' },
            },
          ]}
        />
      </div>
    </>
  );
}

function stateColumns(part: Part): Column<State>[] {
  const end = (state: State, side: 'min' | 'max') => {
    const value = state.current[side];
    return value === undefined ? <span className="text-muted">not stated</span> : formatCurrent(value);
  };
  return [
    {
      key: 'name',
      header: 'State',
      cell: (state) => (
        <>
          <span className="font-semibold">{state.name}</span>
          {state.id === part.restStateId && <span className="ml-2 text-small text-muted">rests here</span>}
        </>
      ),
    },
    {
      key: 'min',
      header: 'Min',
      isNumber: true,
      from: 'sm',
      className: 'whitespace-nowrap',
      cell: (state) => end(state, 'min'),
    },
    {
      key: 'typical',
      header: 'Typical',
      isNumber: true,
      className: 'whitespace-nowrap',
      cell: (state) => (
        <>
          <strong className="font-extrabold">{formatCurrent(state.current.typical)}</strong>
          <span className="block text-small text-muted sm:hidden">{rangeOf(state.current, 'current')}</span>
        </>
      ),
    },
    {
      key: 'max',
      header: 'Max',
      isNumber: true,
      from: 'sm',
      className: 'whitespace-nowrap',
      cell: (state) => end(state, 'max'),
    },
    {
      key: 'law',
      header: 'Draws',
      from: 'lg',
      className: 'text-muted',
      cell: (state) => LAWS[state.law ?? 'constant-current'],
    },
    {
      key: 'origin',
      header: 'Origin',
      className: 'md:w-[36%]',
      cell: (state) => <ProvenanceNote provenance={state.current.provenance ?? { kind: 'assumed' }} />,
    },
  ];
}

function Transitions({ part }: { part: Part }) {
  if (part.transitions.length === 0) return null;
  const stateName = (id: string) => part.states.find((state) => state.id === id)?.name ?? id;
  return (
    <div className="mt-12">
      <FigureRows
        caption="Transitions"
        rows={part.transitions.map((transition) => ({
          label: `${stateName(transition.fromStateId)} to ${stateName(transition.toStateId)}`,
          value: `${formatQuantity(transition.durationS.typical, 'duration')} at ${formatCurrent(transition.current.typical)}`,
          range: null,
          provenance: transition.current.provenance ?? { kind: 'assumed' },
        }))}
      />
    </div>
  );
}
