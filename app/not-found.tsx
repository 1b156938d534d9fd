import Link from 'next/link';
import { Nothing } from '@/components/ui/nothing';

export const metadata = { title: 'Nothing here' };

export default function NotFound() {
  return (
    <main className="wrap lone" id="content">
      <h1 className="h">Nothing is booked under this address</h1>
      <Nothing />
      <p className="small q">The sheet may be a draft that you may not see, or the address may be mistyped.</p>
      <p>
        <Link className="btn main" href="/">
          Open the catalog
        </Link>
      </p>
    </main>
  );
}
