/** The two hatchings that every drawing may use; once a page. */
export function HatchDefs() {
  return (
    <svg width="0" height="0" className="defs" aria-hidden="true">
      <defs>
        <pattern id="hatch" width="6" height="6" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
          <path d="M0 0V6" className="h-red" />
        </pattern>
        <pattern id="hatchi" width="5" height="5" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
          <path d="M0 0V5" className="h-ink" />
        </pattern>
      </defs>
    </svg>
  );
}
