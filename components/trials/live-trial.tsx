'use client';

import { useEffect, useState } from 'react';
import useSWR from 'swr';
import { fetchText } from '@/components/ui/fetch-text';
import type { TrialView } from '@/lib/trials/trial';

const SETTLED = ['passed', 'failed', 'refused'];
const WORKERS_ASKED_MS = 10_000;

/** Workers that reported lately, as the health check tells. */
const countWorkers = async (address: string): Promise<number> => {
  const { workers } = JSON.parse(await fetchText(address)) as { workers: { seenLately: number } };
  return workers.seenLately;
};

export const isSettled = (trial: TrialView) => SETTLED.includes(trial.state);

export interface LiveTrial {
  readonly trial: TrialView | null;
  readonly isWorkerAway: boolean;
  /** True while the stream is broken and the browser tries again. */
  readonly isCut: boolean;
}

/**
 * Follows a trial over server-sent events until it is settled.
 * @param initial   the trial as the page was made; shown until the first event
 * @param followId  the trial to follow, null for none
 * @param onSettled told once, when the followed trial has its result
 */
export function useLiveTrial(initial: TrialView | null, followId: string | null, onSettled: () => void): LiveTrial {
  const [heard, setHeard] = useState<TrialView | null>(null);
  const [isCut, setIsCut] = useState(false);
  const trial = heard && heard.id === (followId ?? heard.id) ? heard : initial;

  useEffect(() => {
    if (followId === null) return;
    const source = new EventSource(`/api/trials/${followId}/events`);
    source.onopen = () => setIsCut(false);
    source.onerror = () => setIsCut(true);
    source.onmessage = (event: MessageEvent<string>) => {
      const next = JSON.parse(event.data) as TrialView;
      setHeard(next);
      if (!isSettled(next)) return;
      source.close();
      onSettled();
    };
    return () => source.close();
  }, [followId, onSettled]);

  const isWaiting = trial?.state === 'waiting';
  const { data: workersSeen } = useSWR(isWaiting ? '/api/health' : null, countWorkers, {
    refreshInterval: WORKERS_ASKED_MS,
  });

  return { trial, isWorkerAway: isWaiting && workersSeen === 0, isCut };
}
