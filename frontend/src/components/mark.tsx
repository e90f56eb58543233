/** Our mark: a burrow under a snow line. */
export function Mark({ className = 'size-8' }: { className?: string }) {
  return (
    <svg
      viewBox="0 0 32 32"
      aria-hidden="true"
      className={className}
      fill="none"
      stroke="currentColor"
      strokeWidth="2.2"
      strokeLinecap="round"
      strokeLinejoin="round"
    >
      <path d="M2.500 11c3.800-3.200 7.200.8 11.500 0s8.500-3.400 15.500-1.600" />
      <path d="M10.500 14v4.500c0 4.200 2.600 7 6 7s6-2.600 6-5.700c0-2.400-1.400-4-3.500-4" />
    </svg>
  );
}
