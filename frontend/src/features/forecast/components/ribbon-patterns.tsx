/** Patterns of the ribbon, defined once: they tell in grey what the tints tell in colour. */
export function RibbonPatterns({ id }: { id: string }) {
  return (
    <svg width="0" height="0" className="absolute" aria-hidden="true" focusable="false">
      <defs>
        <pattern id={`${id}-none`} width="6" height="6" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
          <line x1="0" y1="0" x2="0" y2="6" className="stroke-line" strokeWidth="1" />
        </pattern>
        <pattern id={`${id}-4`} width="5" height="5" patternUnits="userSpaceOnUse">
          <circle cx="1.5" cy="1.5" r="0.75" fill="#1b2822" fillOpacity="0.6" />
        </pattern>
        <pattern id={`${id}-5`} width="3.5" height="3.5" patternUnits="userSpaceOnUse" patternTransform="rotate(-45)">
          <line x1="0" y1="0" x2="0" y2="3.5" stroke="#fbfaf5" strokeOpacity="0.75" strokeWidth="1" />
        </pattern>
        <pattern id={`${id}-cold`} width="4" height="5" patternUnits="userSpaceOnUse">
          <rect x="0" y="3" width="4" height="2" className="fill-frost" />
          <rect x="1.25" y="0" width="1.5" height="3" className="fill-frost" />
        </pattern>
      </defs>
    </svg>
  );
}
