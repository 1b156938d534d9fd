/** Three levels, the computed point between its ticks, the known points below. */
export function BrandMark() {
  return (
    <svg width="34" height="26" viewBox="0 0 34 26" aria-hidden="true">
      <path d="M0 5H34M0 14.5H34M0 24H34" className="s-level s-brand" />
      <rect x="11.5" y="1.4" width="11" height="7.2" rx="3.6" className="s-new" />
      <path d="M7.5 0V10M26.5 0V10" className="s-tick" />
      <circle cx="8" cy="14.5" r="3" className="s-known" />
      <circle cx="26" cy="14.5" r="3" className="s-known" />
      <circle cx="17" cy="24" r="2" className="s-known" />
    </svg>
  );
}
