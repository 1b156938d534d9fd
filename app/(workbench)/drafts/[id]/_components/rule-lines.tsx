/** The rule as the engine writes it; MathML does not break lines, so a long one scrolls in its own frame. */
export const RuleLines = ({ rule }: { rule: readonly string[] }) =>
  rule.map((html) => (
    <div
      key={html}
      className="eqn draftrule"
      role="region"
      aria-label="The rule as a formula"
      tabIndex={0}
      dangerouslySetInnerHTML={{ __html: html }}
    />
  ));
