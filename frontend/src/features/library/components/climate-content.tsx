import type { LibraryContent } from '#common/schemas/api/library.ts';
import { MONTH_NAMES, monthName } from '#common/units/format-duration.ts';
import { formatQuantity, formatTemperature } from '#common/units/format-quantity.ts';

type Climate = Extract<LibraryContent, { kind: 'climate' }>['climate'];

export function ClimateContent({ climate }: { climate: Climate }) {
  const extremes = [
    { label: 'Design cold', extreme: climate.extremes?.coldest },
    { label: 'Design heat', extreme: climate.extremes?.hottest },
  ];
  return (
    <>
      <table className="border-collapse text-right tabular-nums">
        <caption className="mb-2 text-left text-lead font-light">Months</caption>
        <thead>
          <tr className="border-b border-line text-small text-muted">
            <th scope="col" className="py-1.5 pr-10 text-left font-normal">
              Month
            </th>
            <th scope="col" className="py-1.5 pr-8 font-normal">
              Mean
            </th>
            <th scope="col" className="py-1.5 pr-8 font-normal">
              Daily swing, ±
            </th>
            <th scope="col" className="py-1.5 font-normal max-sm:hidden">
              Coldest and warmest hour of a mean day
            </th>
          </tr>
        </thead>
        <tbody>
          {climate.months.map(({ meanC, amplitudeK }, index) => (
            <tr key={MONTH_NAMES[index]} className="border-b border-hair">
              <th scope="row" className="py-1.5 pr-10 text-left font-normal">
                {MONTH_NAMES[index]}
              </th>
              <td className={`py-1.5 pr-8 font-semibold ${meanC < 0 ? 'text-frost' : ''}`}>
                {formatTemperature(meanC)}
              </td>
              <td className="py-1.5 pr-8">{formatQuantity(amplitudeK, 'temperature-difference')}</td>
              <td className="py-1.5 text-muted max-sm:hidden">
                {formatTemperature(meanC - amplitudeK)} and {formatTemperature(meanC + amplitudeK)}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      {extremes.map(
        ({ label, extreme }) =>
          extreme && (
            <p key={label} className="mt-4">
              {label}: <strong className="font-extrabold">{formatTemperature(extreme.temperatureC)}</strong> in{' '}
              {monthName(extreme.month)}
              {(extreme.returnYears ?? 1) > 1 && `, reached once in ${extreme.returnYears} years`}.
            </p>
          ),
      )}
    </>
  );
}
