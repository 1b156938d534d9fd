import type { Metadata } from 'next';
import Link from 'next/link';
import { ChoosePasswordForm } from '@/components/people/choose-password-form';
import { Plate } from '@/components/people/plate';
import { readLink } from '@/lib/people/redeem-link';
import { acceptInvitation } from './actions';

export const metadata: Metadata = { title: 'Invitation', referrer: 'no-referrer' };

/** Where the link of an invitation leads. Opening it uses nothing up. */
export default async function InvitationPage({ params }: PageProps<'/invitation/[token]'>) {
  const { token } = await params;
  const holder = await readLink('invitation', token);
  if (!holder)
    return (
      <Plate title="This invitation does not serve">
        <p>It has been taken up, has run out, or was followed by a later one.</p>
        <p className="small q">
          Taken up already? <Link href="/sign-in">Sign in</Link>. Otherwise ask the keeper of the book for another one.
        </p>
      </Plate>
    );
  return (
    <Plate title={`Welcome, ${holder.name}`}>
      <p className="lab">Choose a password; the book then opens.</p>
      <ChoosePasswordForm act={acceptInvitation} secret={token} email={holder.email} submit="Take up the invitation" />
    </Plate>
  );
}
