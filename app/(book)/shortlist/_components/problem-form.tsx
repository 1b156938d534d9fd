import { AskForm } from '@/components/ui/ask-form';
import type { Question } from '@/lib/shortlist/question';
import type { Requirement } from '@/lib/shortlist/requirement';
import { LANGUAGE_WORDS, OFFER_WORDS } from './condition-columns';

interface PickProps {
  title: string;
  name: keyof Requirement;
  question: Question;
  words: readonly (readonly [value: string, word: string])[];
}

function Fault({ name, question }: { name: keyof Requirement; question: Question }) {
  const fault = question.faults[name];
  const hint = question.hints[name];
  if (!fault && !hint) return null;
  return (
    <p id={`${name}-said`} className={fault ? 'red small' : 'small q'} role={fault ? 'alert' : undefined}>
      {fault ?? hint}
    </p>
  );
}

/** Words in a row, of which one is in force. */
function Pick({ title, name, question, words }: PickProps) {
  return (
    <fieldset className="q1">
      <legend className="lab">{title}</legend>
      <div className="pick">
        {words.map(([value, word]) => (
          <label key={value}>
            <input type="radio" name={name} value={value} defaultChecked={question.texts[name] === value} />
            {word}
          </label>
        ))}
      </div>
      <Fault name={name} question={question} />
    </fieldset>
  );
}

function Blank({
  name,
  label,
  size,
  question,
}: {
  name: keyof Requirement;
  label: string;
  size: number;
  question: Question;
}) {
  const said = question.faults[name] ?? question.hints[name];
  return (
    <input
      name={name}
      size={size}
      aria-label={label}
      defaultValue={question.texts[name]}
      aria-invalid={question.faults[name] !== undefined}
      aria-describedby={said ? `${name}-said` : undefined}
      autoComplete="off"
      maxLength={40}
    />
  );
}

const RANK_WORDS = [
  ['bytes', 'bytes moved'],
  ['memory', 'memory'],
  ['steps', 'steps'],
] as const;

/** The problem in sentences with fields; works without scripts. */
export function ProblemForm({ question }: { question: Question }) {
  const { equation } = question.asked;
  const travels = equation !== 'diffusion';
  return (
    <AskForm action="/shortlist" label="State the problem" className="state1" values={question.texts}>
      <h1 className="h">State the problem</h1>
      <Pick
        title="Equation"
        name="equation"
        question={question}
        words={[
          ['advection', 'Advection'],
          ['wave', 'Wave'],
          ['diffusion', 'Diffusion'],
        ]}
      />
      <Pick
        title="Dimensions"
        name="dims"
        question={question}
        words={[
          ['1', '1'],
          ['2', '2'],
          ['3', '3'],
        ]}
      />
      <fieldset className="q1">
        <legend className="lab">Accuracy</legend>
        <p className="sent">
          at most <Blank name="errorPercent" label="Error allowed, per cent" size={4} question={question} /> % error
          after{' '}
          <Blank
            name="duration"
            label={travels ? 'Distance in wavelengths' : 'Time in e-foldings'}
            size={4}
            question={question}
          />{' '}
          {travels ? 'wavelengths' : 'e-foldings of the wave'}
        </p>
        <Fault name="errorPercent" question={question} />
        <Fault name="duration" question={question} />
      </fieldset>
      <fieldset className="q1">
        <legend className="lab">{travels ? 'Slowest to fastest speed on the grid' : 'Least to most diffusive'}</legend>
        <p className="sent">
          <Blank name="slowest" label="Slowest, part of the bound" size={4} question={question} /> to{' '}
          <Blank name="fastest" label="Fastest, part of the bound" size={4} question={question} /> of the bound
        </p>
        <Fault name="slowest" question={question} />
        <Fault name="fastest" question={question} />
      </fieldset>
      <Pick
        title="Order in time and space"
        name="orderAtLeast"
        question={question}
        words={[
          ['0', 'any'],
          ['2', '2 or more'],
          ['4', '4'],
        ]}
      />
      <Pick
        title="Arrays kept"
        name="arraysAtMost"
        question={question}
        words={[
          ['2', 'up to 2'],
          ['3', 'up to 3'],
          ['4', 'up to 4'],
          ['0', 'any'],
        ]}
      />
      <Pick
        title="Halo"
        name="haloAtMost"
        question={question}
        words={[
          ['1', 'up to 1'],
          ['2', 'up to 2'],
          ['0', 'any'],
        ]}
      />
      {equation === 'advection' ? (
        <Pick
          title="Flow changes sign"
          name="bothSigns"
          question={question}
          words={[
            ['yes', 'yes'],
            ['no', 'no'],
          ]}
        />
      ) : (
        <input type="hidden" name="bothSigns" value={question.asked.bothSigns} />
      )}
      <Pick
        title="Coupling"
        name="coupling"
        question={question}
        words={[
          ['explicit', 'explicit'],
          ['any', 'any'],
        ]}
      />
      <Pick
        title="Damping"
        name="damping"
        question={question}
        words={[
          ['any', 'any'],
          ['none', 'none'],
        ]}
      />
      <Pick title="Kernel in" name="language" question={question} words={Object.entries(LANGUAGE_WORDS)} />
      <Pick title="Offer" name="offer" question={question} words={Object.entries(OFFER_WORDS)} />
      <Pick title="Rank by" name="rank" question={question} words={RANK_WORDS} />
      <div className="acts">
        <button type="submit" className="btn">
          Answer
        </button>
      </div>
    </AskForm>
  );
}
