'use client';

import { useRouter } from 'next/navigation';
import { useCallback, useState, useTransition } from 'react';
import { RefinementPlot } from '@/components/plots/refinement-plot';
import { LANGUAGE_NAMES } from '@/components/trials/finding-rows';
import { FindingsTable } from '@/components/trials/findings-table';
import { isSettled, useLiveTrial } from '@/components/trials/live-trial';
import { refinementSeries } from '@/components/trials/refinement-series';
import { TrialProgress } from '@/components/trials/trial-progress';
import { longDate, moment } from '@/lib/entries/dates';
import type { TrialView } from '@/lib/trials/trial';
import { startTrial } from '../actions';
import { Part } from './part';

interface TrialsPartProps {
  figure: number;
  revisionId: string;
  latest: TrialView | null;
  /** Why no trial can be made of this revision; null where one can. */
  obstacle: string | null;
}

const asideOf = (trial: TrialView | null) => {
  if (!trial) return 'never run';
  if (trial.finishedAt) return `run on ${longDate(trial.finishedAt)}, kernel revision ${trial.revision}`;
  return `asked for by ${trial.queuedBy}, ${moment(trial.queuedAt)}`;
};

/** The latest trial, live while it runs, and the button for a new one. */
export function TrialsPart({ figure, revisionId, latest, obstacle }: TrialsPartProps) {
  const router = useRouter();
  const [followId, setFollowId] = useState(latest && !isSettled(latest) ? latest.id : null);
  const [refusal, setRefusal] = useState<string | null>(null);
  const [isStarting, start] = useTransition();
  const onSettled = useCallback(() => router.refresh(), [router]);
  const { trial, isWorkerAway, isCut } = useLiveTrial(latest, followId, onSettled);
  const isUnderWay = trial !== null && !isSettled(trial);
  const series = trial ? refinementSeries(trial.findings) : null;

  const startNew = () =>
    start(async () => {
      const answer = await startTrial({ revisionId });
      setRefusal(answer.ok ? null : answer.message);
      if (answer.ok) setFollowId(answer.value.trialId);
    });

  return (
    <Part id="trials" figure={figure} name="Trials" aside={asideOf(trial)}>
      {trial && isUnderWay && <TrialProgress trial={trial} isWorkerAway={isWorkerAway} />}
      {isCut && isUnderWay && (
        <p className="small q" role="status">
          The line to the server is cut; it is being taken up again.
        </p>
      )}
      {trial?.note && trial.state !== 'passed' && (
        <div className="errline">
          <p>
            <span className="fails">{trial.state === 'refused' ? 'was not run' : 'did not finish'}</span>
          </p>
          <p className="small q">{trial.note}</p>
        </div>
      )}
      {trial && trial.findings.length > 0 && (
        <div className="trialrow">
          <FindingsTable findings={trial.findings} />
          {series && (
            <figure>
              <RefinementPlot series={series} />
            </figure>
          )}
        </div>
      )}
      {!trial && !obstacle && <p className="cap">The kernels of this revision have not been compiled and run yet.</p>}
      {trial && trial.toolchain.length > 0 && (
        <dl className="toolchain small q">
          {trial.toolchain.map(({ language, version, flags }) => (
            <div key={language}>
              <dt>{LANGUAGE_NAMES[language]}</dt>
              <dd>
                {version} {flags && <code>{flags}</code>}
              </dd>
            </div>
          ))}
        </dl>
      )}
      <p className="cap">A passed trial is evidence for the kernel, not for the code that calls it.</p>
      <div className="bar">
        {obstacle ? (
          <p className="cap">{obstacle}</p>
        ) : (
          <button type="button" className="btn" onClick={startNew} disabled={isStarting || isUnderWay}>
            Start a new trial
          </button>
        )}
        {refusal && (
          <p className="fail small" role="alert">
            {refusal}
          </p>
        )}
      </div>
    </Part>
  );
}
