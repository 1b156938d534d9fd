'use client';

import { createContext, useContext, useState, useSyncExternalStore } from 'react';

/** What a server action answers (lib/web/action). */
export type FormAnswer<T> =
  { ok: true; value: T } | { ok: false; message: string; fields: Readonly<Record<string, string>> };

const FieldFaults = createContext<Readonly<Record<string, string>>>({});
export const useFieldFault = (name: string): string | null => useContext(FieldFaults)[name] ?? null;

// Sent before the page listens, a form would leave the page.
const neverChanges = () => () => undefined;
const onBrowser = () => true;
const onServer = () => false;

interface ActionFormProps<T> {
  act: (form: FormData) => Promise<FormAnswer<T>>;
  /** The word on the button, and while it is at work. */
  submit: string;
  busy: string;
  look?: 'main' | 'warn' | 'plain';
  /** Said once it is done; null says nothing. */
  done?: (value: T) => string | null;
  onDone?: (value: T, form: FormData) => void;
  /** Empties the fields once it is done. */
  empties?: boolean;
  /** Tells forms of the same words apart. */
  label?: string;
  className?: string;
  children?: React.ReactNode;
}

/** A form whose fields keep what was typed, with the sentence of a refusal under its fields. */
export function ActionForm<T>({
  act,
  submit,
  busy,
  look = 'main',
  done,
  onDone,
  empties = false,
  label,
  className = 'form',
  children,
}: ActionFormProps<T>) {
  const isReady = useSyncExternalStore(neverChanges, onBrowser, onServer);
  const [isBusy, setIsBusy] = useState(false);
  const [answer, setAnswer] = useState<FormAnswer<T> | null>(null);

  const send = async (element: HTMLFormElement) => {
    const form = new FormData(element);
    setIsBusy(true);
    const next = await act(form).catch((): FormAnswer<T> => ({
      ok: false,
      message: 'The site does not answer just now. What you typed is still here; try again in a moment.',
      fields: {},
    }));
    setAnswer(next);
    setIsBusy(false);
    if (!next.ok) return;
    if (empties) element.reset();
    onDone?.(next.value, form);
  };

  const said = answer?.ok ? (done?.(answer.value) ?? null) : null;
  return (
    <form
      className={className}
      aria-label={label}
      method="post"
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        void send(event.currentTarget);
      }}
    >
      <FieldFaults value={answer?.ok === false ? answer.fields : {}}>{children}</FieldFaults>
      <div className="acts">
        <button type="submit" className={look === 'plain' ? 'btn' : `btn ${look}`} disabled={!isReady || isBusy}>
          {isBusy ? busy : submit}
        </button>
        <p className={answer?.ok === false ? 'red small' : 'small q'} role={answer?.ok === false ? 'alert' : 'status'}>
          {answer?.ok === false ? answer.message : said}
        </p>
      </div>
    </form>
  );
}
