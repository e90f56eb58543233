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
      <path d="M-20 84c150-40 290-30 450 2s300 36 450 4 220-36 330-18 260 22 430-14" />
      <path d="M1092 108v36c0 36 22 60 52 60s52-22 52-50c0-21-13-35-31-35" />
      <path strokeDasharray="1 15" d="M-20 122c150-38 290-26 450 4s290 34 400 12M1340 122c90 6 190 2 300-18" />
    </svg>
  );
}
