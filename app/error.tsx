'use client';

import { useRouter } from 'next/navigation';
import { startTransition, useCallback } from 'react';
import { PageFault } from '@/components/ui/page-fault';

interface ErrorPageProps {
  error: Error & { digest?: string };
  reset: () => void;
}

export default function ErrorPage({ error, reset }: ErrorPageProps) {
  const router = useRouter();
  const retry = useCallback(
    () =>
      startTransition(() => {
        router.refresh();
        reset();
      }),
    [router, reset],
  );
  return (
    <main className="wrap" id="content">
      <PageFault error={error} retry={retry} />
    </main>
  );
}
