const COLUMNS = [0, 150, 300, 450, 600, 750, 900];
const LEVELS = [300, 450, 600];
const EMPTY_LEVELS = [150, 750, 900];

/** The cover: leapfrog on ruled time levels. */
export const Cover = () => (
  <svg
    viewBox="0 0 900 900"
    preserveAspectRatio="xMidYMid slice"
    className="cover"
    role="img"
    aria-label="Leapfrog stencil drawn on ruled time levels"
  >
    {EMPTY_LEVELS.map((y) => (
      <path key={y} d={`M0 ${y}H900`} className="c-g" />
    ))}
    {LEVELS.map((y) => (
      <g key={y}>
        <path d={`M0 ${y}H900`} className="c-l" />
        {COLUMNS.map((x) => (
          <path key={x} d={`M${x} ${y - 9}v18`} className="c-l" />
        ))}
      </g>
    ))}
    <circle cx="300" cy="450" r="23" className="c-k" />
    <circle cx="600" cy="450" r="23" className="c-k" />
    <circle cx="450" cy="600" r="23" className="c-k" />
    <rect x="394" y="264" width="112" height="72" rx="36" className="c-b" />
    <path d="M366 238v124M534 238v124" className="c-t" />
    <text x="44" y="286" className="c-x">
      n + 1
    </text>
    <text x="44" y="436" className="c-x">
      n
    </text>
    <text x="44" y="586" className="c-x">
      n − 1
    </text>
    <text x="300" y="672" className="c-x" textAnchor="middle">
      i − 1
    </text>
    <text x="450" y="672" className="c-x" textAnchor="middle">
      i
    </text>
    <text x="600" y="672" className="c-x" textAnchor="middle">
      i + 1
    </text>
  </svg>
);
