import { Nothing } from '@/components/ui/nothing';
import type { ConditionKey, conditionToLetGo } from '@/lib/entries/catalog-conditions';

interface NothingFoundProps {
  asked: string;
  inForce: number;
  letGo: ReturnType<typeof conditionToLetGo>;
  onCondition: (key: ConditionKey, value: null) => void;
  onText: (text: string) => void;
  /** Lines that the conditions alone leave, without the text. */
  withoutText: number;
}

const lines = (count: number) => `${count} ${count === 1 ? 'line fits' : 'lines fit'}`;

/** No line is left: three ruled levels without points, why, and what to let go. */
export function NothingFound({ asked, inForce, letGo, onCondition, onText, withoutText }: NothingFoundProps) {
  return (
    <div className="nothing" role="status">
      <Nothing />
      <p>
        <b>
          {asked
            ? `No line answers to “${asked}”${inForce > 0 ? ' under these conditions' : ''}.`
            : `No line meets ${inForce === 1 ? 'this condition' : `all ${inForce} conditions`}.`}
        </b>
      </p>
      {letGo ? (
        <>
          <p className="small q">
            Let go of “{letGo.condition.title.toLowerCase()}: {letGo.option.label}” and {lines(letGo.count)}.
          </p>
          <button type="button" className="btn" onClick={() => onCondition(letGo.condition.key, null)}>
            Let it go
          </button>
        </>
      ) : asked ? (
        <>
          <p className="small q">
            Names, usual wordings, authors and call numbers are looked through. Without the text, {lines(withoutText)}.
          </p>
          <button type="button" className="btn" onClick={() => onText('')}>
            Clear the text
          </button>
        </>
      ) : (
        <p className="small q">
          The book has no line yet, or no single condition stands in the way alone: clear them all.
        </p>
      )}
    </div>
  );
}
