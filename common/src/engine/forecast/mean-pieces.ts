import { LEAST_SEEN_V, seenVoltageV } from '../supply/cell-load.ts';
import type { CellLoad, LoadSight } from '../supply/cell-load.ts';
import type { MeanPiece } from './dekad-load.ts';
import type { SourceTables } from './source-tables.ts';

/** Where nothing depends on voltage one piece does for all. */
const ONE_PIECE: MeanPiece[] = [{ fromSpent: 0, toSpent: Infinity, seenV: 1, slopeV: 0 }];

/**
 * Cuts the spent charge into pieces on which the voltage that mean currents see is linear: between the rows of the open-circuit
 * table, and where a regulator leaves its regulation.
 *
 * @param source Tables of the pack.
 * @param load Mean load; pieces matter only when it depends on voltage.
 * @param sight What loads see of the cell's voltage.
 * @param dekad Capacity factor and shift of the open-circuit voltage, V, at the dekad's mean temperature.
 * @returns Pieces from 0 to Infinity in shares of the starting charge.
 * @example meanPieces(source, load, sight, { capacityFactor: 1, shiftV: 0 })
 */
export function meanPieces(
  source: SourceTables,
  load: CellLoad,
  sight: LoadSight,
  { capacityFactor, shiftV }: { capacityFactor: number; shiftV: number },
): MeanPiece[] {
  if (load.powerW === 0 && load.conductanceS === 0) return ONE_PIECE;
  const pieces: MeanPiece[] = [];
  let fromSpent = 0;
  let fromV = (source.openCircuitV[0] ?? 0) + shiftV;
  for (let row = 1; row < source.depths.length; row++) {
    const toSpent = (source.depths[row] ?? 1) * capacityFactor;
    const toV = (source.openCircuitV[row] ?? 0) + shiftV;
    for (const piece of cut({ spent: fromSpent, cellV: fromV }, { spent: toSpent, cellV: toV }, sight)) {
      pieces.push(piece);
    }
    fromSpent = toSpent;
    fromV = toV;
  }
  pieces.push({ fromSpent, toSpent: Infinity, seenV: seenVoltageV(sight, fromV), slopeV: 0 });
  return pieces;
}

interface Knot {
  spent: number;
  cellV: number;
}

/** Cuts between two rows at the voltages where the seen voltage has a corner. */
function cut(from: Knot, to: Knot, sight: LoadSight): MeanPiece[] {
  const corners = [sight.ceilingV + sight.dropV, LEAST_SEEN_V + sight.dropV].filter(
    (cornerV) => (cornerV - from.cellV) * (cornerV - to.cellV) < 0,
  );
  if (corners.length === 0) return [pieceOf(from, to, sight)];
  const spentAt = (cellV: number): number =>
    from.spent + ((cellV - from.cellV) / (to.cellV - from.cellV)) * (to.spent - from.spent);
  const knots = [from, ...corners.map((cellV) => ({ spent: spentAt(cellV), cellV })), to];
  knots.sort((a, b) => a.spent - b.spent);
  return knots.slice(1).map((end, index) => pieceOf(knots[index] ?? from, end, sight));
}

function pieceOf(from: Knot, to: Knot, sight: LoadSight): MeanPiece {
  const seenV = seenVoltageV(sight, from.cellV);
  const span = to.spent - from.spent;
  const slopeV = span > 0 ? (seenVoltageV(sight, to.cellV) - seenV) / span : 0;
  return { fromSpent: from.spent, toSpent: to.spent, seenV, slopeV };
}
