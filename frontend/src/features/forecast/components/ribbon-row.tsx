import { memo } from 'react';
import type { HeadroomStep, RibbonRow } from '../model/ribbon.ts';

export const HEADROOM_FILL: Record<HeadroomStep, string> = {
  1: 'fill-headroom-1',
  2: 'fill-headroom-2',
  3: 'fill-headroom-3',
  4: 'fill-headroom-4',
  5: 'fill-headroom-5',
};

const share = (value: number): string => `${(value * 100).toFixed(3)}%`;

interface Props {
  row: RibbonRow;
  patternId: string;
  rowPx: number;
  gapPx: number;
  isFirst: boolean;
  isLast: boolean;
  pointedColumn: number | null;
}

/** A year of the band. Its ends stay open where the band goes on in the next row. */
export const RibbonRowPicture = memo(function RibbonRowPicture(props: Props) {
  const { row, patternId, rowPx, gapPx, isFirst, isLast, pointedColumn } = props;
  const coldPx = gapPx >= 4 ? Math.min(5, gapPx) : 1;
  return (
    <svg
      width="100%"
      height={rowPx}
      className="block overflow-visible"
      style={{ marginBottom: gapPx }}
      aria-hidden="true"
      focusable="false"
    >
      <Tints row={row} patternId={patternId} rowPx={rowPx} />
      {row.livedTo < 1 && isLast && (
        <rect x={share(row.livedTo)} width={share(1 - row.livedTo)} height={rowPx} fill={`url(#${patternId}-none)`} />
      )}
      {Array.from({ length: 11 }, (_, i) => (
        <line
          key={i}
          x1={share((i + 1) / 12)}
          x2={share((i + 1) / 12)}
          y2={rowPx}
          className="stroke-paper"
          strokeOpacity="0.35"
        />
      ))}
      {row.cold.map(({ from, to }) => (
        <svg key={from} x={share(from)} y={-coldPx} width={share(to - from)} height={coldPx}>
          {coldPx >= 4 ? (
            <rect width="100%" height="5" y={coldPx - 5} fill={`url(#${patternId}-cold)`} />
          ) : (
            <rect width="100%" height={coldPx} className="fill-frost" />
          )}
        </svg>
      ))}
      <Outline livedTo={isLast ? row.livedTo : 1} rowPx={rowPx} isFirst={isFirst} isLast={isLast} />
      {pointedColumn !== null && (
        <rect
          x={share(pointedColumn / 12)}
          y={-1.5}
          width={share(1 / 12)}
          height={rowPx + 3}
          className="stroke-ink fill-none"
          strokeWidth="2.5"
        />
      )}
      <Marks row={row} rowPx={rowPx} gapPx={gapPx} />
    </svg>
  );
});

function Tints({ row, patternId, rowPx }: { row: RibbonRow; patternId: string; rowPx: number }) {
  return row.runs.map(({ from, to, step }) => (
    <g key={from}>
      {/* A hair wider than its share, so that no seam shows between runs. */}
      <rect
        x={share(from)}
        width={share(Math.min(1, to + 0.0008) - from)}
        height={rowPx}
        className={HEADROOM_FILL[step]}
      />
      {step >= 4 && (
        <rect x={share(from)} width={share(to - from)} height={rowPx} fill={`url(#${patternId}-${step})`} />
      )}
    </g>
  ));
}

function Outline({
  livedTo,
  rowPx,
  isFirst,
  isLast,
}: {
  livedTo: number;
  rowPx: number;
  isFirst: boolean;
  isLast: boolean;
}) {
  const end = share(isLast ? 1 : livedTo);
  return (
    <g className="stroke-ink" strokeWidth={rowPx < 8 ? 0.6 : 1}>
      <line x2={share(livedTo)} />
      <line x2={share(livedTo)} y1={rowPx} y2={rowPx} />
      {isFirst && <line y2={rowPx} strokeWidth="2" />}
      {isLast && livedTo < 1 && (
        <g className="stroke-line">
          <line x1={share(livedTo)} x2={end} />
          <line x1={share(livedTo)} x2={end} y1={rowPx} y2={rowPx} />
          <line x1={end} x2={end} y2={rowPx} />
        </g>
      )}
    </g>
  );
}

function Marks({ row, rowPx, gapPx }: { row: RibbonRow; rowPx: number; gapPx: number }) {
  const overshoot = Math.min(4, gapPx);
  const radius = Math.max(2.25, Math.min(3.5, rowPx / 3));
  return (
    <>
      {row.warningAt !== null && (
        <circle
          cx={share(row.warningAt)}
          cy={rowPx / 2}
          r={radius}
          className="fill-paper stroke-ink"
          strokeWidth="1.75"
        />
      )}
      {row.endAt !== null && (
        <line
          x1={share(row.endAt)}
          x2={share(row.endAt)}
          y1={-overshoot}
          y2={rowPx + overshoot}
          className="stroke-ink"
          strokeWidth="3.5"
        />
      )}
    </>
  );
}
