import { Formula } from '@/components/math/formula';
import { Letters } from '@/components/math/letters';
import { expressionLatex } from '@/lib/facts/expression-latex';
import type { OrderFacts } from '@/lib/facts/facts';
import { withSymbols } from '@/lib/facts/reading-texts';

type Term = OrderFacts['modifiedEquationLeading'];

const SHORT = 160;

/** "d₃ = λ(λ² − 1)/6" for each of the two terms that is not 0. */
function TermLine({ term }: { term: NonNullable<Term> }) {
  const isLong = term.coefficient.length > SHORT;
  return (
    <div className={isLong ? 'tiny-rule' : undefined}>
      <Formula latex={`d_{${term.powerOfITheta}} = ${expressionLatex(term.coefficient)}`} />
    </div>
  );
}

/** The leading terms that a scheme adds to its equation, as coefficients and in words. */
export function ModifiedEquation({ order }: { order: OrderFacts }) {
  const terms = [order.modifiedEquationLeading, order.modifiedEquationSecond].filter(
    (term): term is NonNullable<Term> => term !== null && term.coefficient !== '0',
  );
  if (terms.length === 0) return null;
  return (
    <div className="modified">
      <div className="eqn">
        {terms.map((term) => (
          <TermLine key={term.powerOfITheta} term={term} />
        ))}
      </div>
      <p className="cap">
        {order.meaning && <Letters text={withSymbols(order.meaning)} />} The coefficients are exact; they stand before
        (iθ)ʲ in the <a href="/definitions#modified-equation">modified equation</a>.
      </p>
    </div>
  );
}
