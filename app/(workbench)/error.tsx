'use client';

import { useRouter } from 'next/navigation';
import { startTransition, useCallback } from 'react';
import { PageFault } from '@/components/ui/page-fault';

interface ErrorPageProps {
  error: Error & { digest?: string };
  reset: () => void;
}

/** Within the frame: what was typed is in the browser's own store, and comes back with the page. */
export default function WorkbenchErrorPage({ error, reset }: ErrorPageProps) {
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
