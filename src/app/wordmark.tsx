/** The case: two lids, a handle, one butterfly latch across the seam. */
export function Wordmark() {
  return (
    <span className="inline-flex items-center gap-2.5 text-heading font-semibold text-ink">
      <svg viewBox="0 0 32 32" width="26" height="26" aria-hidden="true" className="shrink-0">
        <path
          fill="var(--case)"
          fillRule="evenodd"
          d="M11 7V5.5A2.5 2.5 0 0 1 13.5 3h5A2.5 2.5 0 0 1 21 5.5V7h5.5A3.5 3.5 0 0 1 30 10.5v15A3.5 3.5 0 0 1 26.5 29h-21A3.5 3.5 0 0 1 2 25.5v-15A3.5 3.5 0 0 1 5.5 7Zm2.5 0h5V5.5h-5Z"
        />
        <path stroke="var(--paper)" strokeWidth="2" d="M2 17.5H11.5M20.5 17.5H30" />
        <rect x="11.5" y="13" width="9" height="9" rx="1.5" fill="var(--tape)" />
      </svg>
      Flightcase
    </span>
  );
}
