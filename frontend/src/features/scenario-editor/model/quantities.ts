import type {
  Cell,
  Duration,
  Leakage,
  Part,
  Provenance,
  Quantity,
  Routine,
  Scenario,
  State,
  Step,
  Supply,
  Transition,
} from '#common/engine/scenario/scenario.types.ts';
import { LIMITS } from '#common/schemas/limits.ts';
import { mapKeeping } from './list.ts';

/** What a figure measures, as far as the page needs to know. */
export type FigureKind = 'current' | 'time' | 'voltage' | 'resistance' | 'charge' | 'capacitance' | 'yearly loss';

export interface QuantitySite {
  /** Key of the field that edits it, as `fields.ts` makes them. */
  field: string;
  /** In words: "Radio, transmit: current". */
  label: string;
  kind: FigureKind;
}

type Visit = (quantity: Quantity, site: QuantitySite) => Quantity;

/**
 * Visits every typed figure of a document and gives the document with what the visitor returned; what did not change
 * keeps its identity.
 */
export function mapQuantities(scenario: Scenario, visit: Visit): Scenario {
  const { node } = scenario;
  const parts = mapKeeping(node.parts, (part) => mapPart(part, visit));
  const leakages = mapKeeping(node.leakages, (leakage) => mapLeakage(leakage, visit));
  const routines = mapKeeping(node.routines, (routine) => mapRoutine(routine, visit));
  const supply = mapSupply(scenario.supply, visit);
  const isNodeSame = parts === node.parts && leakages === node.leakages && routines === node.routines;
  if (isNodeSame && supply === scenario.supply) return scenario;
  return { ...scenario, node: isNodeSame ? node : { ...node, parts, leakages, routines }, supply };
}

/** Replaces keys of an object; the same object when every value is the same as before. */
function assign<T extends object>(object: T, values: Partial<T>): T {
  const next = { ...object, ...values };
  return Object.entries(values).every(([key, value]) => Reflect.get(object, key) === value) ? object : next;
}

function mapPart(part: Part, visit: Visit): Part {
  const field = `node.parts.${part.id}`;
  const nameOf = (stateId: string): string => part.states.find((state) => state.id === stateId)?.name ?? stateId;
  const mapState = (state: State): State => {
    const at = `${field}.states.${state.id}`;
    const label = `${part.name}, ${state.name}`;
    const lowest = state.lowestVoltageV;
    return assign(state, {
      current: visit(state.current, { field: `${at}.current`, label: `${label}: current`, kind: 'current' }),
      ...(lowest && {
        lowestVoltageV: visit(lowest, {
          field: `${at}.lowestVoltageV`,
          label: `${label}: lowest voltage`,
          kind: 'voltage',
        }),
      }),
    });
  };
  const mapTransition = (transition: Transition, index: number): Transition => {
    const at = `${field}.transitions.${index}`;
    const label = `${part.name}, ${nameOf(transition.fromStateId)} to ${nameOf(transition.toStateId)}`;
    return assign(transition, {
      durationS: visit(transition.durationS, { field: `${at}.durationS`, label: `${label}: duration`, kind: 'time' }),
      current: visit(transition.current, { field: `${at}.current`, label: `${label}: current`, kind: 'current' }),
    });
  };
  return assign(part, {
    states: mapKeeping(part.states, mapState),
    transitions: mapKeeping(part.transitions, mapTransition),
    lowestVoltageV: visit(part.lowestVoltageV, {
      field: `${field}.lowestVoltageV`,
      label: `${part.name}: lowest voltage`,
      kind: 'voltage',
    }),
  });
}

function mapLeakage(leakage: Leakage, visit: Visit): Leakage {
  const site: QuantitySite = {
    field: `node.leakages.${leakage.id}.current`,
    label: `${leakage.name}: current`,
    kind: 'current',
  };
  return assign(leakage, { current: visit(leakage.current, site) });
}

function mapRoutine(routine: Routine, visit: Visit): Routine {
  const mapStep = (step: Step): Step => {
    const site: QuantitySite = {
      field: `node.routines.${routine.id}.steps.${step.id}.duration`,
      label: `${routine.name}, ${step.name}: duration`,
      kind: 'time',
    };
    return assign(step, { duration: mapDuration(step.duration, site, visit) });
  };
  return assign(routine, { steps: mapKeeping(routine.steps, mapStep) });
}

function mapDuration(duration: Duration, site: QuantitySite, visit: Visit): Duration {
  if (duration.kind !== 'fixed') return duration;
  const { kind, ...quantity } = duration;
  const next = visit(quantity, site);
  return next === quantity ? duration : { kind, ...next };
}

function mapSupply(supply: Supply, visit: Visit): Supply {
  const { capacitor } = supply;
  const mapped = capacitor && {
    capacitor: assign(capacitor, {
      capacitanceF: visit(capacitor.capacitanceF, {
        field: 'supply.capacitor.capacitanceF',
        label: 'Capacitor: capacitance',
        kind: 'capacitance',
      }),
      leakageA: visit(capacitor.leakageA, {
        field: 'supply.capacitor.leakageA',
        label: 'Capacitor: leakage',
        kind: 'current',
      }),
    }),
  };
  return assign(supply, { cell: mapCell(supply.cell, visit), ...mapped });
}

function mapCell(cell: Cell, visit: Visit): Cell {
  const name = cell.designation;
  const loss = cell.selfDischarge;
  return assign(cell, {
    capacityC: visit(cell.capacityC, { field: 'supply.cell.capacityC', label: `${name}: capacity`, kind: 'charge' }),
    resistanceOhm: mapKeeping(cell.resistanceOhm, (row, index) =>
      assign(row, {
        ohm: visit(row.ohm, {
          field: `supply.cell.resistanceOhm.${index}.ohm`,
          label: `${name}: resistance${cell.resistanceOhm.length > 1 ? ` ${index + 1}` : ''}`,
          kind: 'resistance',
        }),
      }),
    ),
    selfDischarge: assign(loss, {
      lossPerYear: visit(loss.lossPerYear, {
        field: 'supply.cell.selfDischarge.lossPerYear',
        label: `${name}: self-discharge a year`,
        kind: 'yearly loss',
      }),
    }),
  });
}

export interface MissingMaximum {
  site: QuantitySite;
  quantity: Quantity;
}

/** Figures of which more is worse; a high capacity or capacitance does no harm, and a voltage is not a multiple of itself. */
const WORSE_WHEN_HIGHER: ReadonlySet<FigureKind> = new Set(['current', 'time', 'resistance', 'yearly loss']);

function lacksMaximum(quantity: Quantity, { kind }: QuantitySite): boolean {
  if (!WORSE_WHEN_HIGHER.has(kind) || quantity.typical === 0 || quantity.max !== undefined) return false;
  return quantity.distribution !== 'fixed' && quantity.deviation === undefined;
}

/** Every figure that has no maximum and should have one: currents, times, resistances and losses other than zero. */
export function missingMaxima(scenario: Scenario): MissingMaximum[] {
  const missing: MissingMaximum[] = [];
  mapQuantities(scenario, (quantity, site) => {
    if (lacksMaximum(quantity, site)) missing.push({ site, quantity });
    return quantity;
  });
  return missing;
}

/** Sets max = typical × factor for the given fields, or for all that lack one. The figures are marked as assumed. */
export function assumeMaxima(scenario: Scenario, factor: number, fields?: ReadonlySet<string>): Scenario {
  if (!(factor >= 1)) return scenario;
  return mapQuantities(scenario, (quantity, site) =>
    lacksMaximum(quantity, site) && (fields?.has(site.field) ?? true)
      ? withAssumedMaximum(quantity, factor, site.kind)
      : quantity,
  );
}

function withAssumedMaximum(quantity: Quantity, factor: number, kind: FigureKind): Quantity {
  const max = maximum(quantity.typical, factor, kind);
  const earlier = describeEarlier(quantity.provenance);
  const text = `${earlier}Maximum = typical × ${factor}, assumed.`.slice(0, LIMITS.provenanceLength);
  return { ...quantity, max, provenance: { ...quantity.provenance, kind: 'assumed', text } };
}

/** A figure is only as well founded as its weakest side, so its source goes into the text. */
function describeEarlier(provenance: Provenance | undefined): string {
  if (!provenance) return '';
  const text = provenance.text?.trim().replace(/\.$/, '') ?? '';
  if (provenance.kind === 'assumed') return text === '' ? '' : `${text}. `;
  const kind = provenance.kind === 'memory' ? 'from memory' : provenance.kind;
  return `Typical: ${kind}${text === '' ? '' : `, ${text.slice(0, LIMITS.provenanceLength - 100)}`}. `;
}

function maximum(typical: number, factor: number, kind: FigureKind): number {
  // Twelve digits: 1.7e-6 × 1.5 is 2.55e-6 and not 2.5499999999999996e-6.
  const product = Number((typical * factor).toPrecision(12));
  if (kind === 'time') return Math.max(typical, Math.ceil(Number((product * 1e6).toPrecision(12))) / 1e6);
  if (kind === 'yearly loss') return Math.max(typical, Math.min(product, 0.999));
  return Math.max(typical, product);
}
