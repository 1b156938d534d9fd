const LEVELS = [12, 36, 60];
const SITES = Array.from({ length: 6 }, (_, k) => 30 + k * 60);

/** Nothing: three ruled levels without points. What is missing is said beside it. */
export const Nothing = () => (
  <svg className="empty" width="360" height="72" viewBox="0 0 360 72" aria-hidden="true">
    {LEVELS.map((y) => (
      <g key={y}>
        <path d={`M0 ${y}H360`} className="s-level" />
        {SITES.map((x) => (
          <path key={x} d={`M${x} ${y - 4}v8`} className="s-site" />
        ))}
      </g>
    ))}
  </svg>
);
