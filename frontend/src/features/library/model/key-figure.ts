import type { LibraryContent } from '#common/schemas/api/library.ts';
import { formatChargeMah, formatCurrent, formatTemperature } from '#common/units/format-quantity.ts';

/** What tells an item from its neighbours in a list: sleep current, capacity, or how cold and warm it gets. */
export function keyFigure(content: LibraryContent): string {
  switch (content.kind) {
    case 'part': {
      const { part } = content;
      const rest = part.states.find((state) => state.id === part.restStateId);
      return `${part.states.length} states${rest ? `, rests at ${formatCurrent(rest.current.typical)}` : ''}`;
    }
    case 'cell': {
      const { cell } = content;
      return [formatChargeMah(cell.capacityC.typical), cell.chemistry].filter(Boolean).join(', ');
    }
    case 'climate': {
      const means = content.climate.months.map((month) => month.meanC);
      const low = Math.min(...means);
      const high = Math.max(...means);
      return low === high
        ? `${formatTemperature(low)} all year`
        : `months from ${formatTemperature(low)} to ${formatTemperature(high)}`;
    }
  }
}
