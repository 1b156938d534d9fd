'use client';

import { useRouter } from 'next/navigation';
import { startTransition, useCallback } from 'react';
import { PageFault } from '@/components/ui/page-fault';

interface ErrorPageProps {
  error: Error & { digest?: string };
  reset: () => void;
}

/** Within the frame: the head stays, the page says what went wrong. */
export default function BookErrorPage({ error, reset }: ErrorPageProps) {
  const router = useRouter();
  const retry = useCallback(
    () =>
      startTransition(() => {
        router.refresh();
        reset();
      }),
    [router, reset],
  );
  return <PageFault error={error} retry={retry} />;
}
