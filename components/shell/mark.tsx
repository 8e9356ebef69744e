/** The mark: a ladder whose top rung is a notehead. */
function Mark({ size = 28 }: { size?: number }) {
  return (
    <svg viewBox="0 0 28 28" width={size} height={size} aria-hidden focusable="false">
      <g fill="none" stroke="currentColor" strokeWidth="2" strokeLinecap="round">
        <path d="M7 26 L9 2" />
        <path d="M21 26 L19 2" />
        <path d="M7.6 21.5h12.8M8 16.5h12M8.4 11.5h11.2" />
      </g>
      <ellipse cx="14" cy="6.4" rx="4.4" ry="3" transform="rotate(-20 14 6.4)" fill="#b8691a" />
    </svg>
  );
}

export function Wordmark() {
  return (
    <span className="flex items-center gap-[10px] font-display text-[20px] font-bold text-ink">
      <Mark />
      Rungwell
    </span>
  );
}
