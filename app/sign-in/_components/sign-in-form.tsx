'use client';

import { signIn } from 'next-auth/react';
import { useRef, useState } from 'react';
import { useHydrated } from '@/components/ui/use-hydrated';
import { signInSentence } from '@/lib/auth/sign-in-answer';
import type { Role } from '@/lib/people/role';

interface SignInFormProps {
  goTo: string;
  /** A code of a try that came back as a whole page. */
  code: string | null;
  demo: readonly { name: string; email: string; role: Role; comesFor: string; password: string }[];
}

/** E-mail and password; in demo mode also the demo's people as ready buttons. */
export function SignInForm({ goTo, code, demo }: SignInFormProps) {
  const [fault, setFault] = useState(code ? signInSentence(code) : null);
  const [isBusy, setIsBusy] = useState(false);
  const isReady = useHydrated();
  const password = useRef<HTMLInputElement>(null);

  const enter = async (email: string, secret: string) => {
    setIsBusy(true);
    const answer = await signIn('credentials', { email, password: secret, redirect: false }).catch(() => undefined);
    if (answer?.ok && !answer.error) {
      // A whole page load: everything that was kept for nobody is asked for anew.
      window.location.assign(goTo);
      return;
    }
    setFault(signInSentence(answer?.error ?? ''));
    setIsBusy(false);
    password.current?.focus();
    password.current?.select();
  };

  return (
    <>
      <form
        method="post"
        onSubmit={(event) => {
          event.preventDefault();
          const form = new FormData(event.currentTarget);
          void enter(String(form.get('email')), String(form.get('password')));
        }}
      >
        <label className="field">
          <span>E-mail address</span>
          <input name="email" type="email" autoComplete="username" required maxLength={320} />
        </label>
        <div className={fault ? 'field bad' : 'field'}>
          <label htmlFor="password">Password</label>
          <input
            ref={password}
            id="password"
            name="password"
            type="password"
            autoComplete="current-password"
            required
            maxLength={200}
            aria-invalid={fault !== null}
            aria-describedby={fault ? 'sign-in-fault' : undefined}
          />
          <p className="hint" id="sign-in-fault" role="alert">
            {fault}
          </p>
        </div>
        <div className="acts">
          <button className="btn main" type="submit" disabled={!isReady || isBusy}>
            {isBusy ? 'Signing in' : 'Sign in'}
          </button>
        </div>
      </form>
      {demo.length > 0 && (
        <section className="demo" aria-label="Accounts of the demo">
          <p className="lab">The demo’s people: press a name to sign in</p>
          <ul>
            {demo.map((person) => (
              <li key={person.email}>
                <button
                  type="button"
                  disabled={!isReady || isBusy}
                  onClick={() => void enter(person.email, person.password)}
                >
                  <b>{person.name}</b> <span>{person.role}</span>
                  {person.comesFor && <small>{person.comesFor}</small>}
                </button>
              </li>
            ))}
          </ul>
        </section>
      )}
    </>
  );
}
