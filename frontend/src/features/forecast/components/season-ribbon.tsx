import { useId, useMemo, useRef, useState, type KeyboardEvent, type PointerEvent } from 'react';
import type { Forecast, Scenario } from '#common/engine/index.ts';
import { monthName } from '#common/units/format-duration.ts';
import { seasonRibbon, ribbonMeasures, type Ribbon, type RibbonMonth } from '../model/ribbon.ts';
import { monthInWords, monthSentence } from '../model/ribbon-words.ts';
import { RibbonLegend } from './ribbon-legend.tsx';
import { RibbonPatterns } from './ribbon-patterns.tsx';
import { RibbonRowPicture } from './ribbon-row.tsx';
import { RibbonTable } from './ribbon-table.tsx';

/** Months of life as one continuous band, a row a year, tinted by headroom. */
export function SeasonRibbon({ scenario, forecast }: { scenario: Scenario; forecast: Forecast }) {
  const patternId = useId();
  const ribbon = useMemo(() => seasonRibbon(scenario, forecast), [scenario, forecast]);
  const [pointed, setPointed] = useState<number | null>(null);
  const band = useRef<HTMLDivElement>(null);
  const { months, rows } = ribbon;
  if (months.length === 0) return <p className="text-muted">There is no month of life to draw.</p>;

  const last = months.length - 1;
  const shown = pointed === null ? null : Math.min(pointed, last);
  const current = months[shown ?? resting(months)];
  const { rowPx, gapPx, labelEvery, heightPx } = ribbonMeasures(rows.length);

  const handlePointer = (event: PointerEvent): void => {
    const box = band.current?.getBoundingClientRect();
    if (!box || box.width === 0) return;
    const column = Math.floor(((event.clientX - box.left) / box.width) * 12);
    const row = Math.floor((event.clientY - box.top) / (rowPx + gapPx));
    const index = row * 12 + column;
    setPointed(column >= 0 && column < 12 && index >= 0 && index <= last ? index : null);
  };
  const handleKey = (event: KeyboardEvent): void => {
    const next = keyTarget(event.key, shown ?? resting(months), last);
    if (next === null) return;
    event.preventDefault();
    setPointed(next);
  };

  return (
    <section aria-label="Season ribbon">
      <RibbonPatterns id={patternId} />
      <div className="grid grid-cols-[3.1rem_minmax(0,1fr)] grid-rows-[auto_1fr]" style={{ minHeight: heightPx + 19 }}>
        <span />
        <MonthLetters ribbon={ribbon} active={shown === null ? null : shown % 12} />
        <div className="text-muted text-[0.6875rem] leading-none" aria-hidden="true">
          {rows.map(({ year }) => (
            <div key={year} className="flex items-center" style={{ height: rowPx, marginBottom: gapPx }}>
              {year === 1 || year % labelEvery === 0 ? `year ${year}` : ''}
            </div>
          ))}
        </div>
        <div
          ref={band}
          role="slider"
          tabIndex={0}
          aria-label="Month of life"
          aria-orientation="horizontal"
          aria-valuemin={1}
          aria-valuemax={months.length}
          aria-valuenow={(current?.index ?? 0) + 1}
          aria-valuetext={current ? monthSentence(current) : ''}
          onPointerMove={handlePointer}
          onPointerDown={handlePointer}
          onPointerLeave={() => setPointed(null)}
          onBlur={() => setPointed(null)}
          onKeyDown={handleKey}
          className="self-start outline-offset-4"
        >
          {rows.map((row, i) => (
            <RibbonRowPicture
              key={row.year}
              row={row}
              patternId={patternId}
              rowPx={rowPx}
              gapPx={gapPx}
              isFirst={i === 0}
              isLast={i === rows.length - 1}
              pointedColumn={shown !== null && Math.floor(shown / 12) === i ? shown % 12 : null}
            />
          ))}
        </div>
      </div>
      {current && <Readout month={current} isDefault={shown === null} />}
      {ribbon.hiddenYears > 0 && (
        <p className="text-muted text-small">{ribbon.hiddenYears} later years are not drawn.</p>
      )}
      <RibbonLegend patternId={patternId} hasEnd={rows.some((row) => row.endAt !== null)} />
      <RibbonTable months={months} />
    </section>
  );
}

/** The month told while none is pointed at: the end, or the one with the least headroom. */
function resting(months: RibbonMonth[]): number {
  if (months.at(-1)?.hasEnd) return months.length - 1;
  return months.reduce((best, month) => (month.headroomV < (months[best]?.headroomV ?? 0) ? month.index : best), 0);
}

function keyTarget(key: string, from: number, last: number): number | null {
  const steps: Record<string, number> = {
    ArrowRight: from + 1,
    ArrowLeft: from - 1,
    ArrowDown: from + 12,
    ArrowUp: from - 12,
    PageDown: from + 12,
    PageUp: from - 12,
    Home: 0,
    End: last,
  };
  const next = steps[key];
  return next === undefined ? null : Math.max(0, Math.min(last, next));
}

function MonthLetters({ ribbon, active }: { ribbon: Ribbon; active: number | null }) {
  return (
    <div className="text-muted grid grid-cols-12 pb-2 text-center text-[0.6875rem] leading-none" aria-hidden="true">
      {ribbon.columnMonths.map((month, i) => (
        <span key={month} title={monthName(month)} className={i === active ? 'text-ink font-extrabold' : ''}>
          {monthName(month).slice(0, 1)}
        </span>
      ))}
    </div>
  );
}

/** The month under the pointer or a resting one. Two lines high in any case. */
function Readout({ month, isDefault }: { month: RibbonMonth; isDefault: boolean }) {
  const words = monthInWords(month);
  return (
    <p className="text-small mt-1 min-h-[2.6rem] pl-[3.1rem] leading-[1.3rem] tabular-nums" aria-hidden="true">
      <span className="font-bold">{words.when}</span>
      <span className="text-muted">
        {isDefault && !month.hasEnd ? ', least headroom' : ''}
        {words.event === '' ? '' : `, ${words.event}`}
      </span>
      <br />
      {words.headroom} headroom · {words.coldest} coldest · {words.chargeLeft} left
    </p>
  );
}
