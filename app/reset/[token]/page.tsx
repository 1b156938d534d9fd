import type { Metadata } from 'next';
import Link from 'next/link';
import { ChoosePasswordForm } from '@/components/people/choose-password-form';
import { Plate } from '@/components/people/plate';
import { readLink } from '@/lib/people/redeem-link';
import { setNewPassword } from '../actions';

export const metadata: Metadata = { title: 'A new password', referrer: 'no-referrer' };

/** Where the link of a letter leads. Opening it uses nothing up. */
export default async function NewPasswordPage({ params }: PageProps<'/reset/[token]'>) {
  const { token } = await params;
  const holder = await readLink('password-reset', token);
  if (!holder)
    return (
      <Plate title="This link does not serve">
        <p>It has been used, has run out, or was followed by a later one.</p>
        <p>
          <Link href="/reset">Ask for another letter</Link>
        </p>
      </Plate>
    );
  return (
    <Plate title="Choose a new password">
      <p className="lab">{holder.name}, every session of yours ends with it.</p>
      <ChoosePasswordForm act={setNewPassword} secret={token} email={holder.email} submit="Set the password" />
    </Plate>
  );
}
