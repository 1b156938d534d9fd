'use client';

import { useRouter } from 'next/navigation';
import { useId, useState, useTransition } from 'react';
import { REMARK_LENGTH } from '@/lib/reviews/remark-input';
import type { Answered } from './remark-actions';

interface RemarkFormProps {
  label: string;
  button: string;
  /** Fields between the label and the words: which part, which line. */
  children?: React.ReactNode;
  send: (text: string) => Promise<Answered>;
  /** Called when it was taken, or put away. */
  onClose: () => void;
}

/** Words for a remark or an answer; what was typed stays until it is taken. */
export function RemarkForm({ label, button, children, send, onClose }: RemarkFormProps) {
  const router = useRouter();
  const id = useId();
  const [text, setText] = useState('');
  const [refusal, setRefusal] = useState<string | null>(null);
  const [isSending, start] = useTransition();

  const submit = (event: React.FormEvent) => {
    event.preventDefault();
    if (isSending) return;
    start(async () => {
      const answer = await send(text);
      setRefusal(answer.ok ? null : answer.message);
      if (!answer.ok) return;
      setText('');
      router.refresh();
      onClose();
    });
  };

  return (
    <form className="remarkform" onSubmit={submit}>
      {children}
      <div className="field">
        <label htmlFor={id}>{label}</label>
        <textarea
          id={id}
          rows={3}
          maxLength={REMARK_LENGTH}
          value={text}
          onChange={(event) => setText(event.target.value)}
          required
        />
      </div>
      {refusal && (
        <p className="fail small" role="alert">
          {refusal}
        </p>
      )}
      <div className="acts">
        <button type="submit" className="btn" disabled={isSending || text.trim() === ''}>
          {button}
        </button>
        <button type="button" className="word small" onClick={onClose}>
          Put away
        </button>
      </div>
    </form>
  );
}
