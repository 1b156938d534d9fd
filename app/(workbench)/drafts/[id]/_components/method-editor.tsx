'use client';

import { Options } from '@/components/ui/options';
import { LIMITS, type Multistep, type RungeKutta, type TimeMethod } from '@/lib/entries/definition';
import { HeldInput } from './held-input';
import { Stepper } from './stepper';

interface MethodEditorProps {
  time: TimeMethod;
  isReadOnly: boolean;
  onChange: (time: TimeMethod) => void;
}

const KINDS = { 'runge-kutta': 'Runge–Kutta', multistep: 'multistep' };

/** Tableau or multistep coefficients; implicit-explicit methods are written as JSON. */
export function MethodEditor({ time, isReadOnly, onChange }: MethodEditorProps) {
  if (time.kind === 'imex-multistep')
    return <p className="cap">An implicit-explicit multistep method is edited as JSON.</p>;
  return (
    <>
      <p className="viewbar">
        <Options
          title="Method"
          words={isReadOnly ? { [time.kind]: KINDS[time.kind] } : KINDS}
          value={time.kind}
          onValue={(kind) => {
            if (kind === time.kind) return;
            onChange(
              kind === 'multistep'
                ? { kind: 'multistep', alpha: ['-1', '1'], beta: ['1', '0'] }
                : { kind: 'runge-kutta', A: [['0']], b: ['1'] },
            );
          }}
        />
      </p>
      {time.kind === 'runge-kutta' ? (
        <Tableau time={time} isReadOnly={isReadOnly} onChange={onChange} />
      ) : (
        <Steps time={time} isReadOnly={isReadOnly} onChange={onChange} />
      )}
    </>
  );
}

function withStages(time: RungeKutta, stages: number): RungeKutta {
  const grown = (row: readonly string[] | undefined) => Array.from({ length: stages }, (_, k) => row?.[k] ?? '0');
  return {
    ...time,
    A: Array.from({ length: stages }, (_, k) => grown(time.A[k])),
    b: grown(time.b),
    ...(time.c && { c: grown(time.c) }),
  };
}

function Tableau({
  time,
  isReadOnly,
  onChange,
}: {
  time: RungeKutta;
  isReadOnly: boolean;
  onChange: (time: TimeMethod) => void;
}) {
  const stages = time.b.length;
  const columns = Array.from({ length: stages }, (_, k) => k);
  const field = (label: string, value: string, onText: (text: string) => void) => (
    <HeldInput className="inp" value={value} readOnly={isReadOnly} aria-label={label} onText={onText} />
  );
  return (
    <>
      <p className="filebar">
        <Stepper
          name="stages"
          value={stages}
          min={1}
          max={isReadOnly ? stages : LIMITS.stages}
          onStep={(next) => !isReadOnly && onChange(withStages(time, next))}
        />
      </p>
      <div className="scrolls" role="region" aria-label="Tableau" tabIndex={0}>
        <table className="tableau">
          <tbody>
            {time.A.map((row, k) => (
              <tr key={k}>
                <td className="first">
                  {field(`c ${k + 1}`, time.c?.[k] ?? '', (text) => {
                    const c = columns.map((j) => (j === k ? text : (time.c?.[j] ?? '')));
                    const { c: _old, ...rest } = time;
                    onChange(c.every((one) => one === '') ? rest : { ...rest, c: c.map((one) => one || '0') });
                  })}
                </td>
                {columns.map((j) => (
                  <td key={j}>
                    {field(`a ${k + 1}, ${j + 1}`, row[j] ?? '0', (text) =>
                      onChange({
                        ...time,
                        A: time.A.map((old, n) =>
                          n === k ? columns.map((m) => (m === j ? text : (old[m] ?? '0'))) : old,
                        ),
                      }),
                    )}
                  </td>
                ))}
              </tr>
            ))}
            <tr className="last">
              <td className="first m">b</td>
              {columns.map((j) => (
                <td key={j}>
                  {field(`b ${j + 1}`, time.b[j] ?? '0', (text) =>
                    onChange({ ...time, b: time.b.map((old, n) => (n === j ? text : old)) }),
                  )}
                </td>
              ))}
            </tr>
          </tbody>
        </table>
      </div>
      <p className="cap">
        Left of the line <span className="m">c</span>, which may stay empty: then it is the sum of its row.
      </p>
    </>
  );
}

function withLevels(time: Multistep, levels: number): Multistep {
  const grown = (list: readonly string[]) =>
    levels > list.length
      ? [...Array<string>(levels - list.length).fill('0'), ...list]
      : list.slice(list.length - levels);
  return { ...time, alpha: grown(time.alpha), beta: grown(time.beta) };
}

function Steps({
  time,
  isReadOnly,
  onChange,
}: {
  time: Multistep;
  isReadOnly: boolean;
  onChange: (time: TimeMethod) => void;
}) {
  const levels = time.alpha.length;
  const nameOf = (k: number) => {
    const by = k + 2 - levels;
    return by === 0 ? 'n' : `n ${by > 0 ? '+' : '−'} ${Math.abs(by)}`;
  };
  const set = (list: 'alpha' | 'beta', k: number, text: string) =>
    onChange({ ...time, [list]: time[list].map((old, n) => (n === k ? text : old)) });
  return (
    <>
      <p className="filebar">
        <Stepper
          name="levels"
          value={levels}
          min={2}
          max={isReadOnly ? levels : LIMITS.levels}
          onStep={(next) => !isReadOnly && onChange(withLevels(time, next))}
        />
      </p>
      <table className="tableau">
        <thead>
          <tr>
            <th scope="col">Level</th>
            <th scope="col">α, of the values</th>
            <th scope="col">β, of the slopes</th>
          </tr>
        </thead>
        <tbody>
          {time.alpha
            .map((alpha, k) => (
              <tr key={k}>
                <th scope="row" className="m">
                  {nameOf(k)}
                </th>
                <td>
                  <HeldInput
                    className="inp"
                    value={alpha}
                    readOnly={isReadOnly}
                    aria-label={`alpha at ${nameOf(k)}`}
                    onText={(text) => set('alpha', k, text)}
                  />
                </td>
                <td>
                  <HeldInput
                    className="inp"
                    value={time.beta[k] ?? '0'}
                    readOnly={isReadOnly}
                    aria-label={`beta at ${nameOf(k)}`}
                    onText={(text) => set('beta', k, text)}
                  />
                </td>
              </tr>
            ))
            .reverse()}
        </tbody>
      </table>
      <p className="cap">The sum of α u over the levels equals Δt times the sum of β f.</p>
    </>
  );
}
