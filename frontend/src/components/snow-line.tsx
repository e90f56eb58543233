/** Our mark drawn wide, as the ground of a page that has little on it: snow above, a burrow below. */
export function SnowLine({ className = '' }: { className?: string }) {
  return (
    <svg
      viewBox="0 0 1600 240"
      preserveAspectRatio="xMidYMin slice"
      aria-hidden="true"
      className={`pointer-events-none block h-60 w-full text-line ${className}`}
      fill="none"
      stroke="currentColor"
      strokeWidth="1.250"
      strokeLinecap="round"
    >
      <path d="M-20 96c140-44 270-34 410 0s260 40 380 6 170-38 250-24" />
      <path d="M1064 84c120 22 210 2 300-10s170-8 260 18" />
      <path d="M1020 78c6 40 2 62-22 84s-40 40-22 58 74 18 118 8 62-32 44-52-62-14-78-34-4-34 4-58" />
      <path strokeDasharray="1 14" d="M-20 132c140-30 270-26 410 4s290 34 380 10M1180 128c100-16 240-30 440 0" />
    </svg>
  );
}
