import { Formula } from '@/components/math/formula';
import type { Drawn } from '@/lib/reviews/difference/drawn-rule';
import { type RowChange, isChanged } from '@/lib/reviews/difference/row-difference';
import { Fix } from './fix';

/** MathML does not break lines, so a longer rule is set smaller. */
const sizeOf = (latex: string) => (latex.length > 260 ? 'tiny-rule' : latex.length > 130 ? 'small-rule' : undefined);

const Rule = ({ lines }: { lines: readonly string[] }) =>
  lines.map((latex) => (
    <div key={latex} className={sizeOf(latex)}>
      <Formula latex={latex} />
    </div>
  ));

/** The rule as a formula, and every number of it as its author wrote it, to be held against the source. */
export const DefinitionCorrections = ({ rule, rows }: { rule: Drawn; rows: readonly RowChange[] }) => (
  <>
    <div className="eqn" role="group" aria-label="Rule" tabIndex={0}>
      {rule.was.length > 0 ? (
        <>
          <ins className="rule-now">
            <Rule lines={rule.now} />
          </ins>
          <span className="sr"> was </span>
          <del className="rule-was">
            <Rule lines={rule.was} />
          </del>
        </>
      ) : (
        <Rule lines={rule.now} />
      )}
    </div>
    <dl className="numbers corrs">
      {rows.map((row) => (
        <div key={row.place}>
          <dt>{row.place}</dt>
          <dd>{isChanged(row) ? <Fix was={row.was} now={row.now} /> : row.now}</dd>
        </div>
      ))}
    </dl>
  </>
);
