'use client';

import { useRouter } from 'next/navigation';
import { useId, useState, useTransition } from 'react';
import { Vial } from '@/components/marks/vial';
import type { Answered } from '@/components/reviews/remark-actions';
import { REVIEW_POINTS, REVIEW_POINT_TEXT } from '@/lib/reviews/review-list';
import { sendBack, sign, withdraw } from '../../actions';

const CHOICES = ['vet', 'return', 'withdraw'] as const;
export type Choice = (typeof CHOICES)[number];

export interface Offer {
  /** The revision it is about, and what the page showed of it. */
  revisionId: string;
  seen: string;
  /** What it does. */
  says: string;
  /** Why this reader cannot decide so; null where they can. */
  obstacle: string | null;
  button: string;
  /** Who will hear of it. */
  tells: string;
}

interface DecisionFormProps {
  offers: Readonly<Record<Choice, Offer>>;
  signer: string;
}

const LOOK = { vet: 'vetted', return: 'returned', withdraw: 'withdrawn' } as const;
const WORD = { vet: 'Vet', return: 'Return', withdraw: 'Withdraw' } as const;
const DONE = {
  vet: 'Signed.',
  return: 'Returned to its author.',
  withdraw: 'Withdrawn.',
} as const;

/** The decision: its kind, the points that are ticked, and its sentence. Nothing typed is lost where it is refused. */
export function DecisionForm({ offers, signer }: DecisionFormProps) {
  const router = useRouter();
  const id = useId();
  const [choice, setChoice] = useState<Choice>(CHOICES.find((one) => offers[one].obstacle === null) ?? 'vet');
  const [ticked, setTicked] = useState<readonly string[]>([]);
  const [sentence, setSentence] = useState('');
  const [useInstead, setUseInstead] = useState('');
  const [refusal, setRefusal] = useState<string | null>(null);
  const [done, setDone] = useState<string | null>(null);
  const [isSending, start] = useTransition();
  const { revisionId, seen, obstacle, button, tells } = offers[choice];
  const unticked = choice === 'vet' ? REVIEW_POINTS.filter((point) => !ticked.includes(point)) : [];

  const send = async (): Promise<Answered> => {
    if (choice === 'return') return sendBack({ revisionId, seen, sentence });
    if (choice === 'withdraw') return withdraw({ revisionId, seen, sentence, useInstead });
    return sign({ revisionId, seen, sentence, points: [...ticked] });
  };
  const submit = (event: React.FormEvent) => {
    event.preventDefault();
    if (isSending) return;
    start(async () => {
      const answer = await send();
      setRefusal(answer.ok ? null : answer.message);
      if (answer.ok) {
        setDone(DONE[choice]);
        setSentence('');
        setTicked([]);
      }
      router.refresh();
    });
  };

  return (
    <form className="dec" onSubmit={submit} aria-label="Decision">
      <fieldset>
        <legend className="sr">Your decision</legend>
        {CHOICES.map((one) => (
          <label key={one} className={one === choice ? 'on' : undefined}>
            <input
              type="radio"
              name={`${id}-choice`}
              value={one}
              checked={one === choice}
              onChange={() => setChoice(one)}
            />
            <Vial state={LOOK[one]} />
            <b>{WORD[one]}</b>
            <span>{offers[one].says}</span>
          </label>
        ))}
      </fieldset>
      <div>
        {choice === 'vet' && (
          <fieldset className="points">
            <legend className="lab">Review list: every point is ticked before signing</legend>
            {REVIEW_POINTS.map((point) => (
              <label key={point} className="tickbox">
                <input
                  type="checkbox"
                  checked={ticked.includes(point)}
                  onChange={(event) =>
                    setTicked(event.target.checked ? [...ticked, point] : ticked.filter((other) => other !== point))
                  }
                />
                {REVIEW_POINT_TEXT[point]}
              </label>
            ))}
          </fieldset>
        )}
        <div className="field">
          <label htmlFor={`${id}-note`}>
            {choice === 'return'
              ? 'What must change'
              : choice === 'withdraw'
                ? 'What is wrong with it'
                : 'Note for the book'}
          </label>
          <textarea
            id={`${id}-note`}
            rows={3}
            maxLength={1000}
            value={sentence}
            onChange={(event) => setSentence(event.target.value)}
            required
          />
        </div>
        {choice === 'withdraw' && (
          <div className="field">
            <label htmlFor={`${id}-instead`}>Address of the entry to use instead, if there is one</label>
            <input id={`${id}-instead`} value={useInstead} onChange={(event) => setUseInstead(event.target.value)} />
          </div>
        )}
        {refusal && (
          <p className="fail" role="alert">
            {refusal}
          </p>
        )}
        {done && !refusal && <p role="status">{done}</p>}
        {obstacle && <p className="small q">{obstacle}</p>}
        <div className="acts">
          <button
            type="submit"
            className={choice === 'withdraw' ? 'btn warn' : 'btn main'}
            disabled={obstacle !== null || isSending || sentence.trim() === '' || unticked.length > 0}
          >
            {button}
          </button>
          <span className="small q">
            {choice === 'vet' ? `Signing as ${signer}.` : `As ${signer}.`} {tells}
          </span>
        </div>
      </div>
    </form>
  );
}
