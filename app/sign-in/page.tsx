import type { Metadata } from 'next';
import Link from 'next/link';
import { redirect } from 'next/navigation';
import { BrandMark } from '@/components/marks/brand-mark';
import { safeCallbackUrl } from '@/lib/auth/callback-url';
import { currentActor } from '@/lib/auth/current-actor';
import { demoAccounts } from '@/lib/auth/demo-accounts';
import { env } from '@/lib/env';
import { Cover } from './_components/cover';
import { SignInForm } from './_components/sign-in-form';

export const metadata: Metadata = { title: 'Sign in' };

const one = (value: string | string[] | undefined) => (Array.isArray(value) ? value[0] : value);

export default async function SignInPage({ searchParams }: PageProps<'/sign-in'>) {
  const { callbackUrl, error } = await searchParams;
  const goTo = safeCallbackUrl(one(callbackUrl));
  if (await currentActor()) redirect(goTo as '/');
  const office = env().LEVELBOOK_OFFICE;

  return (
    <div className="signin">
      <main id="content">
        <section className="plate">
          <div className="brand">
            <BrandMark />
            Levelbook
          </div>
          <div className="pl">
            {office && <p className="lab">{office}</p>}
            <h1>
              Vetted stencils and <span className="whitespace-nowrap">time-marching</span> schemes
            </h1>
            <SignInForm goTo={goTo} code={one(error) ?? null} demo={await demoAccounts()} />
          </div>
          <p className="small q foot">
            <Link href="/reset">Forgotten your password?</Link> New here? Ask the keeper of the book for an account.
          </p>
        </section>
        <section className="art">
          <Cover />
        </section>
      </main>
    </div>
  );
}
