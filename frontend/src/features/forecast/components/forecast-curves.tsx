import { useMemo, useState } from 'react';
import type { DekadPoint, Forecast, Scenario } from '#common/engine/index.ts';
import { curvePictures, dekadInWords, timeAxis, type CurvePicture } from '../model/curves.ts';
import { CurveChart } from './curve-chart.tsx';

/** Charge, voltages and temperature over life, one time axis, one reading line through all of them. */
export function ForecastCurves({ forecast }: { scenario: Scenario; forecast: Forecast }) {
  const pictures = useMemo(() => curvePictures(forecast), [forecast]);
  const time = useMemo(() => timeAxis(forecast.dekads), [forecast]);
  const [pointed, setPointed] = useState<number | null>(null);
  return (
    <section aria-labelledby="curves-heading">
      <h3 id="curves-heading" className="text-small font-extrabold">
        Over the life
        <span className="text-muted ml-2.5 font-normal">
          every third of a month; voltage under load at its coldest hour
        </span>
      </h3>
      <div className="mt-4 space-y-7">
        {pictures.map((picture) => (
          <div key={picture.id}>
            <CurveChart picture={picture} time={time} dekads={forecast.dekads} pointed={pointed} onPoint={setPointed} />
            <CurveTable picture={picture} dekads={forecast.dekads} />
          </div>
        ))}
      </div>
    </section>
  );
}

function CurveTable({ picture, dekads }: { picture: CurvePicture; dekads: readonly DekadPoint[] }) {
  const [isOpen, setOpen] = useState(false);
  return (
    <details className="text-small mt-1" onToggle={(event) => setOpen(event.currentTarget.open)}>
      <summary className="text-muted hover:text-ink w-fit">{picture.title} as a table</summary>
      {isOpen && (
        <div className="mt-2 max-h-80 overflow-auto" tabIndex={0} role="group" aria-label={`${picture.title}, a table`}>
          <table className="w-full text-left tabular-nums">
            <thead className="bg-paper sticky top-0">
              <tr className="border-line border-b">
                <th className="py-1 pr-4 font-bold">Third of a month</th>
                {picture.curves.map((curve) => (
                  <th key={curve.label} className="py-1 pr-4 text-right font-bold">
                    {curve.label}, {picture.unit}
                  </th>
                ))}
              </tr>
            </thead>
            <tbody>
              {dekads.map((dekad, i) => (
                <tr key={dekad.timeS} className="border-hair border-b">
                  <th scope="row" className="py-1 pr-4 text-left font-normal">
                    {dekadInWords(dekad)}
                  </th>
                  {picture.curves.map((curve) => (
                    <td key={curve.label} className="py-1 pr-4 text-right">
                      {curve.tell(curve.values[i] ?? 0)}
                    </td>
                  ))}
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      )}
    </details>
  );
}
