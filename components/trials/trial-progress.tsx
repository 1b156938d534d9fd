import { Waiting } from '@/components/ui/waiting';
import type { TrialView } from '@/lib/trials/trial';

const NUMBERS = ['None', 'One', 'Two', 'Three', 'Four', 'Five', 'Six', 'Seven', 'Eight', 'Nine'];

/** A trial under way, or one that waits for a worker. */
export function TrialProgress({ trial, isWorkerAway }: { trial: TrialView; isWorkerAway: boolean }) {
  const { done, total, label } = trial.progress;
  if (trial.state === 'waiting') {
    return (
      <Waiting>
        <p>
          <b>{isWorkerAway ? 'No worker is running: the trial waits.' : 'The trial waits for a worker.'}</b>
        </p>
        <p className="small q">
          {isWorkerAway
            ? 'It is booked and will be taken up when a worker starts. Nothing is lost.'
            : 'You may leave; the result is booked.'}
        </p>
      </Waiting>
    );
  }
  return (
    <Waiting done={done} total={total}>
      <p>
        <b>The trial is running{label && `: ${label}`}.</b>
      </p>
      <p className="small q">
        {NUMBERS[done] ?? done} of {total} steps done. You may leave; the result is booked.
      </p>
    </Waiting>
  );
}
