'use client';

import { useEffect } from 'react';

const RETRY_MS = 3000;

interface PageFaultProps {
  error: Error & { digest?: string };
  retry: () => void;
}

/** What an error boundary shows. The text of a fault stays in the log; only its number is shown. */
export function PageFault({ error, retry }: PageFaultProps) {
  const isAway = error.digest === 'database-away';
  useEffect(() => {
    if (!isAway) return;
    const timer = setInterval(retry, RETRY_MS);
    return () => clearInterval(timer);
  }, [isAway, retry]);

  if (isAway) {
    return (
      <div className="lone" role="alert">
        <p className="errline">
          <span className="fails">no answer</span>
        </p>
        <p>
          <b>The database does not answer.</b>
        </p>
        <p className="small q">
          Nothing that was accepted is lost. The page asks again every few seconds and comes back by itself.
        </p>
      </div>
    );
  }
  const isRefused = error.digest === 'not-allowed';
  return (
    <div className="lone" role="alert">
      <p className="errline">
        <span className="fails">{isRefused ? 'not allowed' : 'did not finish'}</span>
      </p>
      <p>
        <b>{isRefused ? 'Your role does not open this page.' : 'This page could not be made.'}</b>
      </p>
      <p className="small q">
        {isRefused
          ? 'An administrator can give you the role it needs.'
          : `The cause is in the server’s log${error.digest ? ` under the number ${error.digest}` : ''}.`}
      </p>
      {!isRefused && (
        <p>
          <button type="button" className="btn" onClick={retry}>
            Try again
          </button>
        </p>
      )}
    </div>
  );
}
