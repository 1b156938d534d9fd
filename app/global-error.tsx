'use client';

import { PageFault } from '@/components/ui/page-fault';
import './globals.css';

/** The last resort: the frame itself failed. */
export default function GlobalErrorPage({ error }: { error: Error & { digest?: string } }) {
  return (
    <html lang="en">
      <body>
        <main className="wrap" id="content">
          <PageFault error={error} retry={() => window.location.reload()} />
        </main>
      </body>
    </html>
  );
}
