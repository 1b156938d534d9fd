import { Formula } from '@/components/math/formula';
import { MathText } from '@/components/math/math-text';
import { Letters } from '@/components/math/letters';
import type { SheetView } from '@/lib/entries/entry';
import { EQUATION_LATEX } from '@/lib/entries/equation-latex';
import { definitionAddress } from '@/lib/facts/definitions';
import type { Reading } from '@/lib/facts/readings';
import { Roofline } from './roofline';

const LONG_VALUE = 9;
const isLong = (value: Reading['value']) =>
  (typeof value === 'string' ? value : value.map(({ text }) => text).join('')).length > LONG_VALUE;

/** MathML does not break lines, so a longer rule is set smaller. */
const sizeOf = (latex: string) => (latex.length > 260 ? 'tiny-rule' : latex.length > 130 ? 'small-rule' : undefined);

/** The rule, its equation and its dimensionless numbers. */
function RuleLines({ rule, sheet }: { rule: readonly string[]; sheet: SheetView }) {
  const equation = sheet.equation ? EQUATION_LATEX[sheet.equation] : null;
  if (rule.length === 0 && !equation) return null;
  return (
    <div className="eqn" role="group" aria-label="Rule" tabIndex={0}>
      {rule.map((latex) => (
        <div key={latex} className={sizeOf(latex)}>
          <Formula latex={latex} />
        </div>
      ))}
      {equation && (
        <div className="def">
          {equation.parameters.map((latex) => (
            <span key={latex}>
              <Formula latex={latex} />
            </span>
          ))}
          <span>
            for <Formula latex={equation.short} />
          </span>
        </div>
      )}
    </div>
  );
}

/** The name of a reading, as a way to its definition. */
function Term({ term }: { term: string }) {
  const address = definitionAddress(term);
  return address ? <a href={address}>{term}</a> : term;
}

/** The left leaf: figures, each with what it means and how it was obtained. */
export const Readings = ({
  rule,
  sheet,
  readings,
}: {
  rule: readonly string[];
  sheet: SheetView;
  readings: readonly Reading[];
}) => (
  <div className="left">
    <div className="leafhd">
      <span>Readings</span>
      <span>computed by engine {sheet.engineVersion}</span>
    </div>
    <RuleLines rule={rule} sheet={sheet} />
    <dl>
      {readings.map(({ term, value, how, obtained }) => (
        <div key={term} className="read">
          <dt>
            <Term term={term} />
          </dt>
          <dd className={isLong(value) ? 'long' : undefined}>
            {typeof value === 'string' ? <Letters text={value} /> : <MathText runs={value} />}
          </dd>
          <dd>
            <Letters text={how} />
            {obtained && (
              <span className="obtained">
                {how && '; '}
                {obtained}
              </span>
            )}
          </dd>
        </div>
      ))}
    </dl>
    {sheet.facts && sheet.facts.kind !== 'time-method' && <Roofline cost={sheet.facts.cost} />}
  </div>
);
