import type { DutyCycle, Forecast, Scenario } from '#common/engine/index.ts';
import { formatShare } from '#common/units/format-quantity.ts';
import { DAY_S } from '#common/units/si.ts';
import { amps, charge } from '../model/figures.ts';
import { partName, stateName } from '../model/names.ts';

/** Share of time, mean current and charge a day of each part and state. */
export function DutyCycles({ scenario, forecast }: { scenario: Scenario; forecast: Forecast }) {
  const parts = scenario.node.parts.filter((part) => forecast.dutyCycles.some((line) => line.partId === part.id));
  if (parts.length === 0) return null;
  return (
    <section aria-labelledby="duty-heading">
      <h3 id="duty-heading" className="text-small font-extrabold">
        How long each part is in each state
        <span className="text-muted ml-2.5 font-normal">over the whole life, on the rail</span>
      </h3>
      <div className="mt-2 overflow-x-auto" role="group" aria-labelledby="duty-heading" tabIndex={0}>
        <table className="w-full min-w-[30rem] border-collapse text-left tabular-nums">
          <thead>
            <tr className="border-line text-small text-muted border-b">
              <th className="py-1 pr-4 font-normal">Part</th>
              <th className="py-1 pr-4 font-normal">State</th>
              <th className="py-1 pr-4 text-right font-normal">Share of time</th>
              <th className="py-1 pr-4 text-right font-normal">Mean current</th>
              <th className="py-1 text-right font-normal">Charge a day</th>
            </tr>
          </thead>
          <tbody>
            {parts.map((part) => (
              <PartLines
                key={part.id}
                scenario={scenario}
                lines={forecast.dutyCycles.filter((line) => line.partId === part.id)}
              />
            ))}
          </tbody>
        </table>
      </div>
    </section>
  );
}

function PartLines({ scenario, lines }: { scenario: Scenario; lines: DutyCycle[] }) {
  return lines.map((line, i) => (
    <tr key={`${line.fromStateId ?? ''}>${line.stateId}`} className="border-hair border-b">
      {i === 0 && (
        <th scope="rowgroup" rowSpan={lines.length} className="py-1.5 pr-4 text-left align-top font-bold">
          {partName(scenario, line.partId)}
        </th>
      )}
      <td className="py-1.5 pr-4">
        {line.fromStateId === null ? '' : `${stateName(scenario, line.partId, line.fromStateId)} → `}
        {stateName(scenario, line.partId, line.stateId)}
      </td>
      <td className="py-1.5 pr-4 text-right">{shareInWords(line.share)}</td>
      <td className="py-1.5 pr-4 text-right">{amps(line.meanCurrentA)}</td>
      <td className="py-1.5 text-right">{charge(line.meanCurrentA * DAY_S)}</td>
    </tr>
  ));
}

/** Nearly all and nearly nothing both keep what makes them differ from all and nothing. */
function shareInWords(share: number): string {
  if (share > 0.999 && share < 1) return formatShare(share, { significantDigits: 6 });
  return formatShare(share);
}
