import type { Metadata } from 'next';
import Link from 'next/link';
import { Plate } from '@/components/people/plate';
import { AskForm } from './_components/ask-form';

export const metadata: Metadata = { title: 'A new password' };

export default function ResetPage() {
  return (
    <Plate title="A new password">
      <p className="lab">A letter with a link comes to the address of your account.</p>
      <AskForm />
      <p className="small">
        <Link href="/sign-in">Back to sign-in</Link>
      </p>
    </Plate>
  );
}
