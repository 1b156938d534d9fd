import { LogPlot } from '@/components/plots/log-plot';
import type { OtherWay } from '@/lib/budgets/answer-budget';
import { factorText, shareText, toleranceText } from '@/lib/budgets/budget-words';
import {
  finestSpacing,
  ladder,
  rulingLimit,
  type Run,
  type Subject,
  timeLimits,
  type Tolerance,
} from '@/lib/budgets/run';
import { bytesText, durationText, lengthText } from '@/lib/budgets/units';
import { decimalText } from '@/lib/facts/reading-texts';
import { driftPlot } from './drift-plot';
import { RungsTable } from './rungs-table';
import { WaysTable } from './ways-table';

export interface Budget {
  readonly run: Run;
  readonly subject: Subject;
  readonly tolerance: Tolerance;
  readonly parameter: number;
  readonly spacing: number;
  readonly symbol: string;
  readonly name: string;
  /** "6 km", "2 h": what was typed. */
  readonly after: string;
}

const nodeText = ({ bandwidth, nodes }: Run) => `${bytesText(bandwidth)}/s${nodes > 1 ? ` × ${nodes}` : ''}`;

/** The answer in one sentence, for the head of the page. */
export function BudgetLead({ budget }: { budget: Budget }) {
  const { run, subject, tolerance, parameter, spacing, after } = budget;
  const rungs = ladder(run, subject, spacing, parameter);
  const [asked, half] = [rungs[1]!.scaled, rungs[2]!.scaled];
  const what = tolerance.kind === 'angle' ? 'drift' : 'error';
  const holds = (tolerance.kind === 'angle' ? asked.drift : asked.error) <= tolerance.value * 1.01;
  return (
    <p className="lead budl">
      <b>
        {durationText(asked.seconds)} and {bytesText(asked.memory)}
      </b>{' '}
      {holds
        ? `keep the ${what} at ${shareText(asked, tolerance)}`
        : `leave a ${what} of ${shareText(asked, tolerance)}, past the ${toleranceText(tolerance)} allowed,`}{' '}
      after {after}. Half the spacing: {durationText(half.seconds)}, {bytesText(half.memory)},{' '}
      {shareText(half, tolerance)}.
    </p>
  );
}

function Limits({ budget }: { budget: Budget }) {
  const { run, subject, parameter, spacing } = budget;
  const limits = timeLimits(run, subject, spacing, parameter);
  const ruling = rulingLimit(limits)!;
  if (limits.length === 1 && run.smallest === 1) return null;
  return (
    <p className="cap">
      <b>{ruling.name[0]!.toUpperCase() + ruling.name.slice(1)} rules the step</b>
      {run.smallest < 1 && ` on the smallest cell, ${lengthText(spacing * run.smallest)}`}:{' '}
      {limits.map(({ name, step }) => `${name} allows ${durationText(step)}`).join('; ')}.
    </p>
  );
}

function Memory({ budget }: { budget: Budget }) {
  const { run, subject, spacing } = budget;
  const finest = finestSpacing(run, subject.facts);
  const where = run.nodes > 1 ? `these ${run.nodes} nodes` : 'this node';
  if (finest === null || finest > run.wavelength / 2)
    return (
      <p className="cap red" role="alert">
        The memory of {where}, {bytesText(run.memory * run.nodes)}, is too small for any grid that holds the shortest
        wave.
      </p>
    );
  return (
    <p className={spacing < finest ? 'cap red' : 'cap'} role={spacing < finest ? 'alert' : undefined}>
      {spacing < finest ? `This does not fit: the memory of ${where} runs out at` : `Memory on ${where} runs out at`} Δx
      = {lengthText(finest)}.
    </p>
  );
}

interface BudgetAnswerProps {
  budget: Budget;
  others: readonly OtherWay[];
  addressOf: (slug: string, parameter: number) => string;
}

export function BudgetAnswer({ budget, others, addressOf }: BudgetAnswerProps) {
  const { run, subject, tolerance, parameter, spacing, symbol, name, after } = budget;
  const rungs = ladder(run, subject, spacing, parameter);
  const [, asked, half] = rungs.map(({ scaled }) => scaled);
  const what = tolerance.kind === 'angle' ? 'Phase drift' : 'Error';
  const title = `${what} after ${after}`;
  const node = nodeText(run);
  const titled = `${name}, ${symbol} ${decimalText(parameter, 3)}`;
  const plot = driftPlot(
    { name: titled, run, subject, tolerance, parameter, rungs, title, node },
    others.filter(
      ({ subject: other, costing }) => other.facts !== subject.facts || costing.parameter < parameter * 0.95,
    ),
  );
  // The scheme itself, where its quickest step is the one asked, is not another way.
  const ways = others.filter(
    ({ subject: other, costing }) =>
      other.facts !== subject.facts || Math.abs(costing.seconds / asked!.seconds - 1) > 0.05,
  );
  const quicker = others.find(({ costing }) => costing.seconds < asked!.seconds * 0.9);
  const shorter = others.find(
    ({ subject: other, costing }) =>
      other.facts === subject.facts && costing.parameter < parameter * 0.9 && costing.seconds < asked!.seconds,
  );
  return (
    <div className="spread budget-spread">
      <div className="left">
        <div className="leafhd">
          <span>Rungs of the ladder</span>
          <span>the run asked for stands between the ticks</span>
        </div>
        <RungsTable
          rungs={rungs}
          subject={subject}
          tolerance={tolerance}
          symbol={symbol}
          node={node}
          errorHead={title}
        />
        <p className="cap">
          Halving Δx: work {factorText(asked!.bytes, half!.bytes)}, memory {factorText(asked!.memory, half!.memory)},{' '}
          {what.toLowerCase()}{' '}
          {factorText(
            tolerance.kind === 'angle' ? asked!.drift : asked!.error,
            tolerance.kind === 'angle' ? half!.drift : half!.error,
          )}
          .
        </p>
        <Limits budget={budget} />
        <Memory budget={budget} />
      </div>
      <div className="right">
        <div className="leafhd">
          <span>{what} against time</span>
          <span>worst direction on the grid</span>
        </div>
        <figure>
          <LogPlot data={plot} id="budget-drift" look="tall" />
        </figure>
        <div className="leafhd next">
          <span>Same {what.toLowerCase()}, other ways</span>
          <span>all at {toleranceText(tolerance)}, each at its quickest step</span>
        </div>
        <WaysTable name={titled} asked={asked!} others={ways} addressOf={addressOf} />
        <p className="cap">
          {shorter
            ? 'The error of the time step rules here: a shorter step allows a coarser grid, and the run is quicker.'
            : quicker
              ? `${quicker.row.title} would hold the same in ${durationText(quicker.costing.seconds)}.`
              : 'No other scheme of the book holds this in much less time.'}{' '}
          Time is bytes moved over bandwidth: a kernel that reads and writes memory once a step. Constant coefficients,
          no boundaries; where results bear on safety, verification remains with you.
        </p>
      </div>
    </div>
  );
}
