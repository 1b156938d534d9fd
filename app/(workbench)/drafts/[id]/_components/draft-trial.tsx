'use client';

import { useCallback, useState, useTransition } from 'react';
import { useRouter } from 'next/navigation';
import { FindingsTable } from '@/components/trials/findings-table';
import { isSettled, useLiveTrial } from '@/components/trials/live-trial';
import { TrialProgress } from '@/components/trials/trial-progress';
import { moment } from '@/lib/entries/dates';
import type { TrialView } from '@/lib/trials/trial';
import { startTrial } from '../actions';

interface DraftTrialProps {
  draftId: string;
  latest: TrialView | null;
  /** Keeps what is typed first, so that the trial is of it. */
  flush: () => Promise<boolean>;
}

const OUTCOMES = { passed: 'passed', failed: 'failed', refused: 'was not run' } as const;

/** Trials of the draft, as often as its author likes; the latest counts. */
export function DraftTrial({ draftId, latest, flush }: DraftTrialProps) {
  const router = useRouter();
  const [followId, setFollowId] = useState(latest && !isSettled(latest) ? latest.id : null);
  const [refusal, setRefusal] = useState<string | null>(null);
  const [isStarting, start] = useTransition();
  const onSettled = useCallback(() => router.refresh(), [router]);
  const { trial, isWorkerAway } = useLiveTrial(latest, followId, onSettled);
  const isUnderWay = trial !== null && !isSettled(trial);

  const tryIt = () =>
    start(async () => {
      if (!(await flush())) {
        setRefusal('This text is not saved yet, so that there is nothing to try.');
        return;
      }
      const answer = await startTrial({ revisionId: draftId });
      setRefusal(answer.ok ? null : answer.message);
      if (answer.ok) setFollowId(answer.value.trialId);
    });

  return (
    <>
      {trial && isUnderWay && <TrialProgress trial={trial} isWorkerAway={isWorkerAway} />}
      {trial && !isUnderWay && (
        <p className="cap">
          The latest trial <b>{OUTCOMES[trial.state as keyof typeof OUTCOMES] ?? trial.state}</b>
          {trial.finishedAt && `, ${moment(trial.finishedAt)}`}. {trial.note}
        </p>
      )}
      {trial && trial.findings.length > 0 && <FindingsTable findings={trial.findings} />}
      {!trial && <p className="cap">The kernels of this draft have not been compiled and run yet.</p>}
      <div className="bar">
        <button type="button" className="btn" onClick={tryIt} disabled={isStarting || isUnderWay}>
          Start a trial
        </button>
        {refusal && (
          <p className="fail small" role="alert">
            {refusal}
          </p>
        )}
      </div>
    </>
  );
}
