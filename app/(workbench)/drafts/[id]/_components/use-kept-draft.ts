'use client';

import { useCallback, useEffect, useRef, useState } from 'react';
import { DraftContent } from '@/lib/entries/draft-content';
import { keepDraft, type KeepAnswer } from '../actions';
import { asContent, dropText, isSameText, storeText, takeStoredText } from './kept-text';

const PAUSE_MS = 700;
const RETRY_MS = 4_000;
/** A line that is cut without a word leaves a request hanging; after this it counts as cut. */
const ANSWER_MS = 20_000;

export type Theirs = Extract<KeepAnswer, { kind: 'conflict' }>['theirs'];

export type Keeping =
  | { kind: 'kept' }
  | { kind: 'saving' }
  /** Typed, and not with the server yet. */
  | { kind: 'unsaved'; why: string; isAgain: boolean }
  | { kind: 'conflict'; theirs: Theirs };

export interface KeptDraft {
  content: DraftContent;
  change: (part: Partial<DraftContent>) => void;
  keeping: Keeping;
  /** Sends what is typed now. @returns whether the server has all of it */
  flush: () => Promise<boolean>;
  /** Ends a conflict. */
  keepMine: () => void;
  takeTheirs: () => void;
  /** What was set aside for theirs; null where nothing was. */
  aside: DraftContent | null;
  bringBack: () => void;
}

interface Server {
  id: string;
  version: number;
  updatedAt: string;
  content: DraftContent;
}

const CUT = 'The line to the server is cut. It is tried again every few seconds.';

/** The answer, or a rejection where none comes. */
function answered<T>(asked: Promise<T>): Promise<T> {
  return new Promise((resolve, reject) => {
    const timer = setTimeout(() => reject(new Error('no answer')), ANSWER_MS);
    asked.then(resolve, reject).finally(() => clearTimeout(timer));
  });
}

function firstText(server: Server): { content: DraftContent; keeping: Keeping } {
  const stored = takeStoredText(server.id);
  const content = stored && asContent(stored.content, server.content);
  if (!stored || !content || isSameText(content, server.content))
    return { content: server.content, keeping: { kind: 'kept' } };
  if (stored.version === server.version)
    return { content, keeping: { kind: 'unsaved', why: 'This text had not reached the server.', isAgain: true } };
  const theirs = { version: server.version, at: server.updatedAt, content: server.content };
  return { content, keeping: { kind: 'conflict', theirs } };
}

const NAMES: Readonly<Record<string, string>> = {
  title: 'the title',
  gist: 'the gist',
  notes: 'the notes',
  synonyms: 'the other names',
  references: 'the references',
  changeNote: 'the note of the change',
  definition: 'the definition',
};

function formFault(content: DraftContent): string | null {
  const parsed = DraftContent.safeParse(content);
  if (parsed.success) return null;
  const [issue] = parsed.error.issues;
  return `In ${NAMES[String(issue?.path[0])] ?? 'the text'}: ${issue?.message ?? 'it cannot be read'}. It is kept in this browser meanwhile.`;
}

/** A draft that is kept as it is written: by the server after a short pause, by the browser at once. */
export function useKeptDraft(server: Server, isReadOnly: boolean): KeptDraft {
  const [first] = useState(() => firstText(server));
  const [content, setContent] = useState(first.content);
  const [keeping, setKeeping] = useState<Keeping>(first.keeping);
  const [aside, setAside] = useState<DraftContent | null>(null);
  const now = useRef({ content: first.content, version: server.version, kept: server.content });
  const timer = useRef<ReturnType<typeof setTimeout> | undefined>(undefined);
  const flight = useRef<Promise<boolean> | null>(null);
  /** The newest `send`, for timers that outlive a drawing of the page. */
  const sendLater = useRef<() => Promise<boolean>>(() => Promise.resolve(false));
  const isStopped = useRef(first.keeping.kind === 'conflict');

  const send = useCallback(async (): Promise<boolean> => {
    clearTimeout(timer.current);
    if (flight.current) await flight.current;
    if (isStopped.current) return false;
    const { content: sent, version, kept } = now.current;
    if (isSameText(sent, kept)) {
      dropText(server.id);
      setKeeping({ kind: 'kept' });
      return true;
    }
    const fault = formFault(sent);
    if (fault) {
      setKeeping({ kind: 'unsaved', why: fault, isAgain: false });
      return false;
    }
    setKeeping({ kind: 'saving' });
    const again = (why: string) => {
      setKeeping({ kind: 'unsaved', why, isAgain: true });
      timer.current = setTimeout(() => void sendLater.current(), RETRY_MS);
      return false;
    };
    const work = answered(keepDraft({ revisionId: server.id, version, content: sent })).then(
      (answer) => {
        if (!answer.ok) return again(answer.message);
        if (answer.value.kind === 'conflict') {
          isStopped.current = true;
          setKeeping({ kind: 'conflict', theirs: answer.value.theirs });
          return false;
        }
        now.current = { ...now.current, version: answer.value.version, kept: sent };
        const isAll = isSameText(now.current.content, sent);
        if (isAll) {
          dropText(server.id);
          setKeeping({ kind: 'kept' });
        } else timer.current = setTimeout(() => void sendLater.current(), PAUSE_MS);
        return isAll;
      },
      () => again(CUT),
    );
    flight.current = work;
    const done = await work;
    if (flight.current === work) flight.current = null;
    return done;
  }, [server.id]);

  useEffect(() => {
    sendLater.current = send;
    if (isReadOnly) return;
    if (first.keeping.kind === 'unsaved') timer.current = setTimeout(() => void send(), PAUSE_MS);
    const online = () => void sendLater.current();
    // The last words before the window closes are in the browser's store; the next visit sends them.
    window.addEventListener('online', online);
    return () => {
      window.removeEventListener('online', online);
      clearTimeout(timer.current);
    };
  }, [send, first, isReadOnly]);

  const put = useCallback(
    (next: DraftContent) => {
      now.current = { ...now.current, content: next };
      setContent(next);
      storeText(server.id, now.current.version, next);
      if (isStopped.current) return;
      setKeeping((before) => (before.kind === 'unsaved' ? before : { kind: 'saving' }));
      clearTimeout(timer.current);
      timer.current = setTimeout(() => void sendLater.current(), PAUSE_MS);
    },
    [server.id],
  );

  return {
    content,
    keeping,
    aside,
    change: useCallback((part) => put({ ...now.current.content, ...part }), [put]),
    flush: send,
    keepMine: () => {
      if (keeping.kind !== 'conflict') return;
      isStopped.current = false;
      now.current = { ...now.current, version: keeping.theirs.version, kept: keeping.theirs.content };
      void send();
    },
    takeTheirs: () => {
      if (keeping.kind !== 'conflict') return;
      const { theirs } = keeping;
      setAside(now.current.content);
      isStopped.current = false;
      now.current = { content: theirs.content, version: theirs.version, kept: theirs.content };
      setContent(theirs.content);
      dropText(server.id);
      setKeeping({ kind: 'kept' });
    },
    bringBack: () => {
      if (!aside) return;
      const mine = aside;
      setAside(now.current.content);
      put(mine);
    },
  };
}
