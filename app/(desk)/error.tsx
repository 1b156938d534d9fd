'use client';

import { useRouter } from 'next/navigation';
import { startTransition, useCallback } from 'react';
import { PageFault } from '@/components/ui/page-fault';

interface ErrorPageProps {
  error: Error & { digest?: string };
  reset: () => void;
}

/** Within the frame, so that the way back to the desk stays. */
export default function DeskErrorPage({ error, reset }: ErrorPageProps) {
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
