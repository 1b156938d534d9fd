import { Vial } from '@/components/marks/vial';
import type { ConditionKey, CountedCondition, CountedOption } from '@/lib/entries/catalog-conditions';
import { REVISION_STATES } from '@/lib/entries/revision-state';

interface ConditionsProps {
  conditions: readonly CountedCondition[];
  onCondition: (key: ConditionKey, value: string | null) => void;
}

/** The conditions that stand in the second row, opened by a word. */
const FURTHER: readonly ConditionKey[] = ['kind', 'stable', 'damping', 'levels', 'language'];

const OptionMark = ({ condition, option }: { condition: ConditionKey; option: CountedOption }) => {
  const state = condition === 'state' ? REVISION_STATES.find((one) => one === option.value) : undefined;
  return (
    <b>
      {state && <Vial state={state} small />}
      {option.label}
    </b>
  );
};

function Options({
  condition,
  onCondition,
}: {
  condition: CountedCondition;
  onCondition: ConditionsProps['onCondition'];
}) {
  return (
    <ul>
      {condition.options.map((option) => (
        <li key={option.value} className={option.inForce ? 'on' : option.count === 0 ? 'zero' : undefined}>
          <button
            type="button"
            aria-pressed={option.inForce}
            onClick={() => onCondition(condition.key, option.inForce ? null : option.value)}
          >
            <OptionMark condition={condition.key} option={option} />
            <i>
              {option.count}
              <span className="sr"> lines</span>
            </i>
          </button>
        </li>
      ))}
    </ul>
  );
}

const isWide = ({ key, options }: CountedCondition) => key === 'state' || (key === 'equation' && options.length > 3);

/** A band of ruled columns: every option, and the count it would leave. */
export function ConditionBand({ conditions, onCondition }: ConditionsProps) {
  const first = conditions.filter(({ key }) => !FURTHER.includes(key));
  const further = conditions.filter(({ key }) => FURTHER.includes(key));
  const column = (condition: CountedCondition) => (
    <div
      key={condition.key}
      className={isWide(condition) ? 'six' : undefined}
      role="group"
      aria-label={condition.title}
    >
      <h3>{condition.title}</h3>
      <Options condition={condition} onCondition={onCondition} />
    </div>
  );
  return (
    <section className="conditions" aria-label="Conditions">
      <div
        className={first.some(({ key, options }) => key === 'equation' && options.length > 3) ? 'band many' : 'band'}
      >
        {first.map(column)}
      </div>
      <details className="further" open={further.some(({ options }) => options.some(({ inForce }) => inForce))}>
        <summary>More conditions</summary>
        <div className="band">{further.map(column)}</div>
      </details>
    </section>
  );
}

/** The same on a phone: one button, and the conditions in force as ticked words. */
export function NarrowConditions({ conditions, onCondition, onClear }: ConditionsProps & { onClear: () => void }) {
  const inForce = conditions.flatMap((condition) =>
    condition.options.filter((option) => option.inForce).map((option) => ({ condition, option })),
  );
  return (
    <details className="bandm">
      <summary>
        <span className="btn">Conditions{inForce.length > 0 && `, ${inForce.length} in force`}</span>
        {inForce.map(({ condition, option }) => (
          <span key={condition.key} className="ticks">
            {option.label}
          </span>
        ))}
      </summary>
      {inForce.length > 0 && (
        <button type="button" className="word" onClick={onClear}>
          clear
        </button>
      )}
      <div className="bandlist">
        {conditions.map((condition) => (
          <div key={condition.key} role="group" aria-label={condition.title}>
            <h3>{condition.title}</h3>
            <Options condition={condition} onCondition={onCondition} />
          </div>
        ))}
      </div>
    </details>
  );
}
