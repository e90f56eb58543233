import { loadedVoltageV } from './cell-load.ts';
import type { CellLoad, LoadSight } from './cell-load.ts';

/** A stretch of depth along which open-circuit voltage and resistance are linear. */
export interface SourcePiece {
  openCircuitFromV: number;
  openCircuitToV: number;
  resistanceFromOhm: number;
  resistanceToOhm: number;
}

/** A linear function of the share w of a stretch: value at its beginning and end. */
type Line = readonly [number, number];

const at = ([from, to]: Line, w: number): number => from + (to - from) * w;

/** A load and the lowest voltage of the pack that is allowed under it, V. */
export interface LimitedLoad {
  load: CellLoad;
  limitV: number;
}

/**
 * Where along a stretch a load first pulls the voltage below its limit.
 *
 * All borders between working and failing are roots of polynomials in the share: of the operating point meeting the limit (degree
 * 1), of the collapse (degree 2), of a regulator leaving its regulation (degree 1). So the stretch is cut at their roots and
 * judged between them, which finds the first failure even where the voltage rises again.
 *
 * @param limited Load and limit.
 * @param sight What the load sees of the voltage.
 * @param piece Open-circuit voltage and resistance at both ends.
 * @returns Share of the stretch, 0 to 1; null when it works all along. At the limit it still works.
 * @example firstFailingShare({ load: { constantA: 1, powerW: 0, conductanceS: 0 }, limitV: 2 }, { dropV: 0, ceilingV: Infinity },
 *   { openCircuitFromV: 3, openCircuitToV: 1, resistanceFromOhm: 0, resistanceToOhm: 0 }) // 0.5
 */
export function firstFailingShare(limited: LimitedLoad, sight: LoadSight, piece: SourcePiece): number | null {
  const { load, limitV } = limited;
  const { openCircuitFromV, openCircuitToV, resistanceFromOhm, resistanceToOhm } = piece;
  const from = standing(limited, sight, openCircuitFromV, resistanceFromOhm);
  if (from === FAILS) return 0;
  const to = standing(limited, sight, openCircuitToV, resistanceToOhm);
  // Without constant power all borders are of degree 1, and two good ends mean a good stretch.
  if (to !== FAILS && (load.powerW === 0 || (from === to && from !== WORKS))) return null;
  const openCircuit: Line = [openCircuitFromV, openCircuitToV];
  const resistance: Line = [resistanceFromOhm, resistanceToOhm];
  const borders = [...bordersOf(limited, sight, openCircuit, resistance), 1].sort((a, b) => a - b);
  let last = 0;
  for (const border of borders) {
    const middle = (last + border) / 2;
    const isGood = loadedVoltageV(load, sight, at(openCircuit, middle), at(resistance, middle)) >= limitV;
    if (border > last && !isGood) return last;
    last = Math.max(last, border);
  }
  return to === FAILS ? 1 : null;
}

const FAILS = 0;
/** Works at this end, which proves nothing about the inside. */
const WORKS = 1;
/** Works with the limit between the two roots of the operating point, a border of degree 1. */
const BETWEEN = 2;
/** Works in regulation, a border of degree 1. */
const HELD = 3;

function standing(
  { load, limitV }: LimitedLoad,
  sight: LoadSight,
  openCircuitV: number,
  ohm: number,
): typeof FAILS | typeof WORKS | typeof BETWEEN | typeof HELD {
  const voltageV = loadedVoltageV(load, sight, openCircuitV, ohm);
  if (!(voltageV >= limitV)) return FAILS;
  const { dropV, ceilingV } = sight;
  if (load.powerW === 0) return WORKS;
  if (voltageV >= ceilingV + dropV) return HELD;
  const division = 1 + ohm * load.conductanceS;
  const source = openCircuitV - dropV - ohm * load.constantA;
  const seenV = limitV - dropV;
  const isBetween = division * seenV * seenV - source * seenV + ohm * load.powerW <= 0;
  return isBetween && source <= 2 * division * ceilingV ? BETWEEN : WORKS;
}

function bordersOf(
  { load, limitV }: LimitedLoad,
  { dropV, ceilingV }: LoadSight,
  openCircuit: Line,
  resistance: Line,
): number[] {
  const { constantA, powerW, conductanceS } = load;
  const line = (value: (openCircuitV: number, ohm: number) => number): Line => [
    value(openCircuit[0], resistance[0]),
    value(openCircuit[1], resistance[1]),
  ];
  const seenLimitV = limitV - dropV;
  const source = line((openCircuitV, ohm) => openCircuitV - dropV - ohm * constantA);
  const division = line((_, ohm) => 1 + ohm * conductanceS);
  const power = line((_, ohm) => ohm * powerW);
  // Where the operating point, or the least voltage of one, meets a voltage v.
  const meets = (v: number): Line => [
    division[0] * v * v - source[0] * v + power[0],
    division[1] * v * v - source[1] * v + power[1],
  ];
  const turns = (v: number): Line => [source[0] - 2 * division[0] * v, source[1] - 2 * division[1] * v];
  const lines = [
    source,
    turns(seenLimitV),
    powerW === 0 ? lineToLimit(source, division, seenLimitV) : meets(seenLimitV),
  ];
  if (ceilingV !== Infinity) {
    const heldA = constantA + powerW / ceilingV + conductanceS * ceilingV;
    const held = (v: number): Line => line((openCircuitV, ohm) => openCircuitV - ohm * heldA - v);
    lines.push(held(ceilingV + dropV), held(limitV), turns(ceilingV));
  }
  return [...lines.flatMap(rootOfLine), ...collapses(source, division, power)].filter((w) => w > 0 && w < 1);
}

const lineToLimit = (source: Line, division: Line, limitV: number): Line => [
  source[0] - division[0] * limitV,
  source[1] - division[1] * limitV,
];

function rootOfLine([from, to]: Line): number[] {
  return from * to < 0 ? [from / (from - to)] : [];
}

/** Roots of the discriminant `source² − 4·division·power`, a quadratic in the share. */
function collapses(source: Line, division: Line, power: Line): number[] {
  if (power[0] === 0 && power[1] === 0) return [];
  const slope = ([from, to]: Line): number => to - from;
  const a = slope(source) ** 2 - 4 * slope(division) * slope(power);
  const b = 2 * source[0] * slope(source) - 4 * (division[0] * slope(power) + power[0] * slope(division));
  const c = source[0] ** 2 - 4 * division[0] * power[0];
  if (a === 0) return b === 0 ? [] : [-c / b];
  const discriminant = b * b - 4 * a * c;
  if (discriminant < 0) return [];
  const q = -(b + (b < 0 ? -1 : 1) * Math.sqrt(discriminant)) / 2;
  return q === 0 ? [0] : [q / a, c / q];
}
