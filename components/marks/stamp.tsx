/** The stamp of a vetted revision: level, never tilted; its bubble slides in once. */
export function Stamp({ revision, date, names }: { revision: number; date: string; names: readonly string[] }) {
  return (
    <div className="stamp">
      <svg width="264" height="66" viewBox="0 0 264 66" role="img" aria-label="Vetted">
        <rect x="2" y="8" width="260" height="50" rx="25" className="st-outer" />
        <rect x="6.5" y="12.5" width="251" height="41" rx="20.5" className="st-inner" />
        <path d="M62 0V66M202 0V66" className="st-ticks" />
        <g className="st-slide">
          <rect x="71" y="15" width="122" height="36" rx="18" className="s-new st-bubble" />
          <text x="132" y="39" textAnchor="middle" className="st-word">
            VETTED
          </text>
        </g>
      </svg>
      <p>
        Revision {revision} · {date}
        <br />
        {names.join(', ')}
      </p>
    </div>
  );
}
